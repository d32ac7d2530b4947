import type { Reading } from '../../contract/documents.ts';
import type { TimeWindow } from '../window.ts';
import { baselineOf } from './mean.ts';
import { extremes, type Sampled } from './sampled.ts';

/**
 * The extreme value in a window, less the baseline's mean. "positive" takes the highest value, "negative" the lowest,
 * "largest" whichever lies further from the baseline.
 *
 * @returns signed, in the unit of the values (A or V).
 */
export function peakOf(
  trace: Sampled,
  direction: Reading['direction'],
  window: TimeWindow,
  baseline?: TimeWindow,
): number {
  const { least, most } = extremes(trace, window);
  const base = baselineOf(trace, baseline);
  switch (direction) {
    case 'positive':
      return most - base;
    case 'negative':
      return least - base;
    case 'largest':
      return Math.abs(most - base) >= Math.abs(least - base) ? most - base : least - base;
    default:
      return direction satisfies never;
  }
}
