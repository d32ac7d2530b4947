import type { TimeWindow } from '../window.ts';
import { integral, type Sampled } from './sampled.ts';

/**
 * Mean over a window, less the baseline's mean: (1/T)·∫ x dt − x̄_baseline, straight lines between samples.
 *
 * @returns in the unit of the values (A or V).
 */
export function meanOf(trace: Sampled, window: TimeWindow, baseline?: TimeWindow): number {
  return mean(trace, window) - baselineOf(trace, baseline);
}

/** The mean over the baseline's window; 0 without one. */
export function baselineOf(trace: Sampled, baseline: TimeWindow | undefined): number {
  return baseline === undefined ? 0 : mean(trace, baseline);
}

function mean(trace: Sampled, window: TimeWindow): number {
  return integral(trace, window) / (window.to - window.from);
}
