import type { Tick } from './ticks.ts';

// What is larger is refused before any memory is asked for. Common practice: none; our own.

/** In one sweep: 40 minutes at 20 kHz. */
export const mostSamplesPerSweep = 50_000_000;
/** In all sweeps; each is kept three times for a pipette, as recording, command and membrane: 2.4 GB. */
export const mostSamplesInAll = 100_000_000;
/** Numbers that all traces of all pipettes and probes come to, eight bytes each. */
export const mostNumbersInAll = 400_000_000;
/** In a protocol: rungs times repeats. */
export const mostSweeps = 10_000;
/** Blocks of all lanes times rungs: a protocol is checked rung by rung. */
export const mostBlocksInAll = 2_000_000;
/** Pulses in one sweep. */
export const mostPulsesPerSweep = 1_000_000;

/** Samples at 0, h, 2h ... up to and including the sweep's end where that is a multiple of the interval. */
export function sampleCount(duration: Tick, interval: Tick): number {
  return Math.floor(duration / interval) + 1;
}
