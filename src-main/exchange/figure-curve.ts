import type { Trace } from '../contract/results.ts';

/** Pixels of one panel and the values at its edges. */
export interface Frame {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly from_ms: number;
  readonly to_ms: number;
  readonly low: number;
  readonly high: number;
}

/**
 * A trace as an SVG path. Where samples lie closer than `1/perPixel` they are thinned to the first, least, most and last
 * of each column, so that no peak is lost whatever the length.
 */
export function curvePath(trace: Trace, frame: Frame, perPixel = 4): string {
  const columns = Math.max(1, Math.ceil((frame.right - frame.left) * perPixel));
  const { values } = trace;
  const each = Math.max(1, Math.ceil(values.length / columns));
  const kept: number[] = [];
  for (let start = 0; start < values.length; start += each) {
    const end = Math.min(start + each, values.length) - 1;
    let least = start;
    let most = start;
    for (let i = start; i <= end; i += 1) {
      if ((values[i] ?? NaN) < (values[least] ?? NaN)) least = i;
      if ((values[i] ?? NaN) > (values[most] ?? NaN)) most = i;
    }
    kept.push(...new Set([start, Math.min(least, most), Math.max(least, most), end]));
  }
  let pen = 'M';
  const parts: string[] = [];
  for (const i of kept) {
    const value = values[i] ?? NaN;
    if (!Number.isFinite(value)) {
      pen = 'M';
      continue;
    }
    const x = xOf(trace.start_ms + i * trace.interval_ms, frame);
    parts.push(`${pen}${x.toFixed(2)} ${yOf(value, frame).toFixed(2)}`);
    pen = 'L';
  }
  return parts.join('');
}

export function xOf(time_ms: number, { left, right, from_ms, to_ms }: Frame): number {
  return left + ((time_ms - from_ms) / (to_ms - from_ms)) * (right - left);
}

export function yOf(value: number, { top, bottom, low, high }: Frame): number {
  return bottom - ((value - low) / (high - low)) * (bottom - top);
}
