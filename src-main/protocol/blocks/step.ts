import type { Segment } from '../segment.ts';
import { ticksOfMs } from '../ticks.ts';

/** One level for the block's duration. */
export function stepSegments(block: { readonly duration_ms: number; readonly level: number }): Segment[] {
  return [{ start: 0, end: ticksOfMs(block.duration_ms), v0: block.level, v1: block.level }];
}
