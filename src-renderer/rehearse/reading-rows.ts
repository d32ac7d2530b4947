import type { ReadingForecast } from '../../src-main/contract/results.ts';
import { biasWords } from '../text/bias.ts';
import { familyScale, orZero } from '../text/rounding.ts';

export interface ReadingRow {
  readonly id: string;
  readonly name: string;
  readonly unit: ReadingForecast['unit'];
  /** NaN where it could not be taken. */
  readonly recorded: number;
  /** Null where there is no truth to compare with. */
  readonly truth: number | null;
  readonly bias: number | null;
  /** The bias in words about size, "29 % too small"; "–" where the true value is zero or unknown. */
  readonly words: string;
}

/**
 * What each reading gives in one sweep: as recorded, as an ideal clamp would read it, and the difference. What is rounding
 * beside the reading's other sweeps is 0.
 */
export function readingRows(readings: readonly ReadingForecast[], sweep: number): ReadingRow[] {
  return readings.map((reading) => {
    const scale = familyScale(reading.recorded, reading.truth);
    const recorded = orZero(reading.recorded[sweep] ?? NaN, scale);
    const truth = reading.truth ? orZero(reading.truth[sweep] ?? NaN, scale) : null;
    const bias = truth === null ? null : orZero(recorded - truth, scale);
    return {
      id: reading.reading,
      name: reading.name,
      unit: reading.unit,
      recorded,
      truth,
      bias,
      words: truth === null ? '–' : biasWords(recorded, truth, reading.unit, scale),
    };
  });
}
