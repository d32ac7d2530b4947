import type { Tick } from './ticks.ts';

/** A stretch of a block in ticks from the block's start: linear from v0 to v1, in the lane's unit (mV or pA). */
export interface Segment {
  readonly start: Tick;
  readonly end: Tick;
  readonly v0: number;
  readonly v1: number;
}
