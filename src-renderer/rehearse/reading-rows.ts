import type { ReadingForecast } from '../../src-main/contract/results.ts';

export interface ReadingRow {
  readonly id: string;
  readonly name: string;
  readonly unit: ReadingForecast['unit'];
  /** NaN where it could not be taken. */
  readonly recorded: number;
  /** Null where there is no truth to compare with. */
  readonly truth: number | null;
  readonly bias: number | null;
  /** Of the true value; null where that is zero or unknown. */
  readonly bias_percent: number | null;
}

/** What each reading gives in one sweep: as recorded, as an ideal clamp would read it, and the difference. */
export function readingRows(readings: readonly ReadingForecast[], sweep: number): ReadingRow[] {
  return readings.map((reading) => {
    const recorded = reading.recorded[sweep] ?? NaN;
    const truth = reading.truth ? (reading.truth[sweep] ?? NaN) : null;
    const bias = truth === null ? null : recorded - truth;
    return {
      id: reading.reading,
      name: reading.name,
      unit: reading.unit,
      recorded,
      truth,
      bias,
      bias_percent: bias === null || truth === null || truth === 0 ? null : (100 * bias) / Math.abs(truth),
    };
  });
}
