import type { Range } from '../charts/series.ts';

/** Where a stretch of time lies on a strip, in per cent of its width; null when it is out of the view. */
export function stripPlace(from_ms: number, to_ms: number, view: Range): { left: number; width: number } | null {
  const whole = view.to - view.from;
  const from = Math.max(from_ms, view.from);
  const to = Math.min(to_ms, view.to);
  if (to < from || (to === from && to_ms > from_ms)) return null;
  return { left: (100 * (from - view.from)) / whole, width: (100 * (to - from)) / whole };
}
