import type { Range } from './series.ts';

/** Zooming in stops at this share of the whole: beyond it the numbers of the axis run out of digits. */
const smallestShare = 1e-6;

/** The view narrowed (factor below 1) or widened about a fixed point, kept inside the whole. Null: the whole. */
export function zoomed(view: Range, whole: Range, about: number, factor: number): Range | null {
  const width = (view.to - view.from) * factor;
  const full = whole.to - whole.from;
  if (width >= full) return null;
  if (width < full * smallestShare) return view;
  const share = (about - view.from) / (view.to - view.from);
  return inside({ from: about - share * width, to: about + (1 - share) * width }, whole);
}

/** The view moved by a distance, stopped at the ends of the whole. */
export function panned(view: Range, whole: Range, by: number): Range {
  return inside({ from: view.from + by, to: view.to + by }, whole);
}

/** The view moved just far enough to hold x. */
export function following(view: Range, whole: Range, x: number): Range {
  if (x < view.from) return panned(view, whole, x - view.from);
  if (x > view.to) return panned(view, whole, x - view.to);
  return view;
}

function inside(view: Range, whole: Range): Range {
  const width = view.to - view.from;
  if (view.from < whole.from) return { from: whole.from, to: whole.from + width };
  if (view.to > whole.to) return { from: whole.to - width, to: whole.to };
  return view;
}
