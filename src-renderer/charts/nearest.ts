import { xAt, type Series } from './series.ts';

export interface Found {
  readonly series: Series;
  readonly index: number;
  readonly x: number;
  readonly y: number;
  /** In pixels. */
  readonly away: number;
}

export interface Scale {
  readonly x: (value: number) => number;
  readonly y: (value: number) => number;
}

/**
 * The point of all series nearest to a place on the canvas. A line counts where it runs, not only at its points, so that
 * a long straight stretch can be hit; the index is then its nearer end. Null when there is no number at all.
 */
export function nearest(all: readonly Series[], px: number, py: number, scale: Scale): Found | null {
  let best: Found | null = null;
  const consider = (series: Series, index: number, away: number): void => {
    if (best && away >= best.away) return;
    best = { series, index, x: xAt(series, index), y: series.y[index] ?? NaN, away };
  };
  for (const series of all) {
    let beforeX = NaN;
    let beforeY = NaN;
    for (let i = 0; i < series.y.length; i += 1) {
      const x = scale.x(xAt(series, i)) - px;
      const y = scale.y(series.y[i] ?? NaN) - py;
      if (Number.isFinite(x) && Number.isFinite(y)) {
        consider(series, i, Math.hypot(x, y));
        if (series.drawn !== 'points' && Number.isFinite(beforeX)) {
          const dx = x - beforeX;
          const dy = y - beforeY;
          const along = -(beforeX * dx + beforeY * dy) / (dx * dx + dy * dy || 1);
          if (along > 0 && along < 1) {
            consider(series, along < 0.5 ? i - 1 : i, Math.hypot(beforeX + along * dx, beforeY + along * dy));
          }
        }
        beforeX = x;
        beforeY = y;
      } else {
        beforeX = NaN;
      }
    }
  }
  return best;
}
