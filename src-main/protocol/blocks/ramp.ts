import type { Segment } from '../segment.ts';
import { ticksOfMs } from '../ticks.ts';

/** Straight from one level to another: from + (to − from)·t/duration. */
export function rampSegments(block: {
  readonly duration_ms: number;
  readonly from: number;
  readonly to: number;
}): Segment[] {
  return [{ start: 0, end: ticksOfMs(block.duration_ms), v0: block.from, v1: block.to }];
}
