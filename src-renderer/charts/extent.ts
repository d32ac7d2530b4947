import { xAt, type Mark, type Range, type Series, type Shading } from './series.ts';

function widened(low: number, high: number): Range {
  if (!(low <= high)) return { from: 0, to: 1 };
  if (low < high) return { from: low, to: high };
  const half = low === 0 ? 1 : Math.abs(low) * 0.1;
  return { from: low - half, to: high + half };
}

/** From the first to the last abscissa of all series; 0 to 1 when there is nothing. */
export function xExtent(series: readonly Series[]): Range {
  let low = Infinity;
  let high = -Infinity;
  for (const one of series) {
    for (let i = 0; i < one.y.length; i += 1) {
      const x = xAt(one, i);
      if (x < low) low = x;
      if (x > high) high = x;
    }
  }
  return widened(low, high);
}

/**
 * From the smallest to the largest finite value of all series, with y shadings and marks kept in sight and a twentieth
 * of air at both ends.
 */
export function yExtent(series: readonly Series[], shadings: readonly Shading[], marks: readonly Mark[]): Range {
  let low = Infinity;
  let high = -Infinity;
  const take = (y: number): void => {
    if (!Number.isFinite(y)) return;
    if (y < low) low = y;
    if (y > high) high = y;
  };
  for (const one of series) for (let i = 0; i < one.y.length; i += 1) take(one.y[i] ?? NaN);
  for (const shading of shadings) {
    if (shading.axis !== 'y') continue;
    take(shading.from);
    take(shading.to);
  }
  for (const mark of marks) if (mark.axis === 'y') take(mark.at);
  const bare = widened(low, high);
  const air = 0.05 * (bare.to - bare.from);
  return { from: bare.from - air, to: bare.to + air };
}
