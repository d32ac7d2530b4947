import type { Segment } from '../segment.ts';
import { ticksOfMs } from '../ticks.ts';

/** Stays at the lane's holding level for the block's duration. */
export function holdSegments(block: { readonly duration_ms: number }, holding: number): Segment[] {
  return [{ start: 0, end: ticksOfMs(block.duration_ms), v0: holding, v1: holding }];
}
