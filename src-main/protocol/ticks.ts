// Protocol time is counted in whole picoseconds, so that edges add up exactly and no sweep drifts against its samples.
import type { Second } from '../units/si.ts';

/** A whole number of picoseconds. Exact in a double up to 9007 s; beyond, to 1 part in 10^16. */
export type Tick = number;

const perMillisecond = 1e9;
const perSecond = 1e12;

/** Ticks in a time given in ms; a tenth of a microsecond, which doubles cannot hold, becomes exact here. */
export function ticksOfMs(ms: number): Tick {
  return Math.round(ms * perMillisecond);
}

/** Ticks in a time given in µs. */
export function ticksOfUs(us: number): Tick {
  return Math.round(us * 1e6);
}

/** Start of event `index` of a series at `rate` Hz. One product per event: an error cannot grow with the index. */
export function ticksOfEvent(index: number, rate_Hz: number): Tick {
  return Math.round((index * perSecond) / rate_Hz);
}

/** One rounding: the nearest double to the exact time. */
export function secondsOf(ticks: Tick): Second {
  return ticks / perSecond;
}

export function msOf(ticks: Tick): number {
  return ticks / perMillisecond;
}
