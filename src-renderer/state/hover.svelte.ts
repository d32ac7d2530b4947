// The place on the cell under the pointer: for the tooltip and for placing probes.
import type { Site } from '../../src-main/contract/documents.ts';

export interface HoveredPlace {
  readonly site: Site;
  readonly compartment: number;
  /** Within the canvas, px. */
  readonly x: number;
  readonly y: number;
}

class HoverState {
  place = $state.raw<HoveredPlace | null>(null);
}

export const hover = new HoverState();
