import type { Reading } from '../../contract/documents.ts';
import { resolveWindow, type BlocksByLane } from '../window.ts';
import { chargeOf } from './charge.ts';
import { meanOf } from './mean.ts';
import { peakOf } from './peak.ts';
import type { Sampled } from './sampled.ts';

/** A reading taken from a trace, in SI; NaN where its window is not on the sweep. */
export function takeReading(reading: Reading, trace: Sampled, sweep: BlocksByLane): number {
  const window = resolveWindow(reading.window, sweep);
  const baseline = reading.baseline && resolveWindow(reading.baseline, sweep);
  if (window === undefined || (reading.baseline && baseline === undefined)) return NaN;
  switch (reading.measure) {
    case 'peak':
      return peakOf(trace, reading.direction, window, baseline);
    case 'mean':
      return meanOf(trace, window, baseline);
    case 'charge':
      return chargeOf(trace, window, baseline);
    default:
      return reading.measure satisfies never;
  }
}

/** Unit a reading is told in, from its measure and what its pipette records. */
export function readingUnit(measure: Reading['measure'], mode: 'voltage clamp' | 'current clamp') {
  if (measure === 'charge') return mode === 'voltage clamp' ? ('fC' as const) : ('mV·ms' as const);
  return mode === 'voltage clamp' ? ('pA' as const) : ('mV' as const);
}

/** SI to the unit of `readingUnit`. 1 A·s is 1e15 fC, 1 V·s is 1e6 mV·ms. */
export function readingInUnit(value: number, unit: ReturnType<typeof readingUnit>): number {
  const factors = { pA: 1e12, mV: 1e3, fC: 1e15, 'mV·ms': 1e6 };
  return value * factors[unit];
}
