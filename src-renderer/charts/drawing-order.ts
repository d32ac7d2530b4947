import type { Series } from './series.ts';

const dashes = { solid: [], dashed: [7, 4], dotted: [1.5, 3] } as const;

/** Quiet ones first, then the rest as given, the selected last and therefore on top. */
export function drawingOrder(series: readonly Series[]): Series[] {
  const rank = (one: Series): number => (one.selected === true ? 2 : one.quiet === true ? 0 : 1);
  return [...series].sort((a, b) => rank(a) - rank(b));
}

export function lineWidth(series: Series): number {
  if (series.selected === true) return 2.25;
  return series.quiet === true ? 1 : 1.5;
}

export function dash(series: Series): number[] {
  return [...dashes[series.stroke]];
}
