import type { Second } from '../units/si.ts';
import { secondsOf, type Tick } from './ticks.ts';

/** More than this in one sweep, or in all, is refused before any memory is asked for. Common practice: none; our own. */
export const mostSamplesPerSweep = 50_000_000;
export const mostSamplesInAll = 1_000_000_000;

/** Samples at 0, h, 2h ... up to and including the sweep's end where that is a multiple of the interval. */
export function sampleCount(duration: Tick, interval: Tick): number {
  return Math.floor(duration / interval) + 1;
}

/** Time of a sample: one product and one rounding, whatever its index. */
export function sampleTime(index: number, interval: Tick): Second {
  return secondsOf(index * interval);
}
