import type { TimeWindow } from '../window.ts';
import { baselineOf } from './mean.ts';
import { integral, type Sampled } from './sampled.ts';

/**
 * Area under the trace, over the baseline: ∫ (x − x̄_baseline) dt over the window, straight lines between samples.
 *
 * @returns in the unit of the values times s: C for a current, V·s for a voltage.
 */
export function chargeOf(trace: Sampled, window: TimeWindow, baseline?: TimeWindow): number {
  return integral(trace, window) - baselineOf(trace, baseline) * (window.to - window.from);
}
