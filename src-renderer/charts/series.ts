// What a chart is asked to show. Plain data: the drawing, the picture, the vector file and the numbers all come from it.

/** Evenly spaced, or one number per point. */
export type Abscissa = { readonly start: number; readonly interval: number } | ArrayLike<number>;

/** A theme colour, or a place on the ladder of a pipette's sweeps (0 nearest to the canvas, 1 farthest from it). */
export type Paint = { readonly token: string } | { readonly sweeps: 'a' | 'b'; readonly at: number };

export interface Series {
  readonly key: string;
  readonly label: string;
  readonly x: Abscissa;
  readonly y: ArrayLike<number>;
  readonly paint: Paint;
  /** Recorded solid, true dotted; pipette A solid, B dashed. */
  readonly stroke: 'solid' | 'dashed' | 'dotted';
  readonly drawn: 'line' | 'points' | 'line and points';
  /** Thicker and drawn last. */
  readonly selected?: boolean;
  /** How single points are marked; a circle when absent. Told apart by shape where hue alone would have to do it. */
  readonly shape?: 'circle' | 'triangle' | 'rect' | 'rectRot' | 'cross';
  /** Kept out of the legend and of the crosshair's readout: one of many sweeps. */
  readonly quiet?: boolean;
}

/** A stretch of an axis with a meaning: the clamp window, a reading's window, the tolerance. */
export interface Shading {
  readonly axis: 'x' | 'y';
  readonly from: number;
  readonly to: number;
  readonly label: string;
  /** Theme colour of the fill. */
  readonly token: string;
  /** Laid under other shadings. */
  readonly isFaint?: boolean;
}

/** One line across the plot: a trust distance, the accepted bias. */
export interface Mark {
  readonly axis: 'x' | 'y';
  readonly at: number;
  readonly label: string;
  readonly token: string;
}

/** What one chart shows, drawn alike on the canvas and in a vector file. */
export interface Picture {
  readonly series: readonly Series[];
  readonly shadings: readonly Shading[];
  readonly marks: readonly Mark[];
  readonly x: Axis;
  readonly y: Axis;
  readonly xView: Range;
  readonly yView: Range;
  readonly legend: boolean;
  /** The x axis is drawn once, below: this one keeps only its line. */
  readonly bareX?: boolean;
}

/** Where all charts on one time axis are read. */
export interface Cursor {
  readonly x: number;
  /** Shown in a pill above the plot; empty for none. */
  readonly words: string;
}

export interface Range {
  readonly from: number;
  readonly to: number;
}

/** What an axis measures and in what; drawn as "words (unit)". */
export interface Axis {
  readonly words: string;
  readonly unit: string;
}

export function axisLabel(axis: Axis): string {
  return axis.unit === '' ? axis.words : `${axis.words} (${axis.unit})`;
}

export function isEven(x: Abscissa): x is { readonly start: number; readonly interval: number } {
  return 'interval' in x;
}

/** The abscissa of point i. */
export function xAt(series: Pick<Series, 'x'>, i: number): number {
  return isEven(series.x) ? series.x.start + i * series.x.interval : (series.x[i] ?? NaN);
}

/** First index at or beyond x; the length when there is none. The abscissa must not fall. */
export function firstAtOrAfter(series: Pick<Series, 'x' | 'y'>, x: number): number {
  const n = series.y.length;
  if (isEven(series.x)) {
    const at = Math.ceil((x - series.x.start) / series.x.interval - 1e-9);
    return Math.max(0, Math.min(n, at));
  }
  let low = 0;
  let high = n;
  while (low < high) {
    const middle = (low + high) >> 1;
    if (xAt(series, middle) < x) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** The series at x, straight between its points; null outside it or where a neighbour is not a number. */
export function valueAt(series: Pick<Series, 'x' | 'y'>, x: number): number | null {
  const after = firstAtOrAfter(series, x);
  const n = series.y.length;
  if (n === 0 || after >= n) return null;
  const x1 = xAt(series, after);
  const y1 = series.y[after] ?? NaN;
  if (Math.abs(x1 - x) <= 1e-9 * Math.max(1, Math.abs(x))) return Number.isFinite(y1) ? y1 : null;
  if (after === 0) return null;
  const x0 = xAt(series, after - 1);
  const y0 = series.y[after - 1] ?? NaN;
  const y = y0 + ((x - x0) / (x1 - x0)) * (y1 - y0);
  return Number.isFinite(y) ? y : null;
}
