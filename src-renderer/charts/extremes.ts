import { xAt, type Series } from './series.ts';

export interface Extremes {
  readonly label: string;
  readonly lowest: number;
  readonly lowestAt: number;
  readonly highest: number;
  readonly highestAt: number;
}

/** The lowest and highest value of each series and where they lie: the chart in words. Series without a number drop out. */
export function extremes(series: readonly Series[]): Extremes[] {
  const rows: Extremes[] = [];
  for (const one of series) {
    let low = -1;
    let high = -1;
    for (let i = 0; i < one.y.length; i += 1) {
      const y = one.y[i] ?? NaN;
      if (!Number.isFinite(y)) continue;
      if (low < 0 || y < (one.y[low] ?? NaN)) low = i;
      if (high < 0 || y > (one.y[high] ?? NaN)) high = i;
    }
    if (low < 0) continue;
    rows.push({
      label: one.label,
      lowest: one.y[low] ?? NaN,
      lowestAt: xAt(one, low),
      highest: one.y[high] ?? NaN,
      highestAt: xAt(one, high),
    });
  }
  return rows;
}
