import { firstAtOrAfter, xAt, type Range, type Series } from './series.ts';

export interface Point {
  x: number;
  y: number;
}

/**
 * The points of a series worth drawing in a view of `columns` pixels: all of them when they are few, else the smallest
 * and the largest of each column in the order they occur, so that no spike is lost. One point beyond each edge is kept,
 * so that the line leaves the view instead of ending in it. A value that is not a number stays as a gap.
 */
export function thinned(series: Pick<Series, 'x' | 'y'>, view: Range, columns: number): Point[] {
  const n = series.y.length;
  const first = Math.max(0, firstAtOrAfter(series, view.from) - 1);
  const last = Math.min(n - 1, firstAtOrAfter(series, view.to));
  const count = last - first + 1;
  const points: Point[] = [];
  if (count <= 0) return points;
  if (count <= 2 * columns) {
    for (let i = first; i <= last; i += 1) points.push({ x: xAt(series, i), y: series.y[i] ?? NaN });
    return points;
  }
  const push = (i: number): void => void points.push({ x: xAt(series, i), y: series.y[i] ?? NaN });
  push(first);
  for (let column = 0; column < columns; column += 1) {
    const start = first + Math.floor((column * count) / columns);
    const end = first + Math.floor(((column + 1) * count) / columns);
    let low = -1;
    let high = -1;
    let gap = -1;
    for (let i = start; i < end; i += 1) {
      const y = series.y[i] ?? NaN;
      if (!Number.isFinite(y)) gap = i;
      else {
        if (low < 0 || y < (series.y[low] ?? NaN)) low = i;
        if (high < 0 || y > (series.y[high] ?? NaN)) high = i;
      }
    }
    const kept = [...new Set([low, high, gap])].filter((i) => i > first && i < last);
    for (const i of kept.sort((a, b) => a - b)) push(i);
  }
  push(last);
  return points;
}
