import { secondsOf, ticksOfUs, type Tick } from './ticks.ts';
import type { Second } from '../units/si.ts';

/**
 * Longest step chosen unasked, µs. Fast sodium gates take about 100 µs at body temperature; second order needs a few
 * steps within that.
 */
const longestStep_us = 25;

/** The largest whole part of the sampling interval that is at most 25 µs long. */
export function chosenStep(samplingTicks: Tick): Second {
  const parts = Math.ceil(samplingTicks / ticksOfUs(longestStep_us));
  return secondsOf(samplingTicks) / parts;
}

/** Whether a step goes into the sampling interval a whole number of times. */
export function dividesSampling(step_us: number, sampling_us: number): boolean {
  const parts = sampling_us / step_us;
  return Math.round(parts) >= 1 && Math.abs(parts - Math.round(parts)) <= 1e-9 * parts;
}
