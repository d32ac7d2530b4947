// Measures on a computed course: regular samples, and values at extra times that need no interpolation.

export interface Series {
  /** Value i of `regular` stands at i·step. */
  readonly step_ms: number;
  readonly regular: Float64Array;
  /** Ascending. */
  readonly times_ms: readonly number[];
  readonly extra: Float64Array;
}

/** The cubic through four equally spaced values, at place x from the second (0) to the third (1). Lagrange's form. */
function cubic(a: number, b: number, c: number, d: number, x: number): number {
  return (
    (-a * x * (x - 1) * (x - 2)) / 6 +
    (b * (x + 1) * (x - 1) * (x - 2)) / 2 -
    (c * (x + 1) * x * (x - 2)) / 2 +
    (d * (x + 1) * x * (x - 1)) / 6
  );
}

/** Times of upward crossings of a level, ms: bracketed by samples, then bisected on the local cubic. */
export function crossings(series: Series, level: number): number[] {
  const { regular, step_ms } = series;
  const times: number[] = [];
  for (let i = 1; i < regular.length; i++) {
    if (!(regular[i - 1]! < level && regular[i]! >= level)) continue;
    const near = [-2, -1, 0, 1].map((offset) => regular[Math.min(Math.max(i + offset, 0), regular.length - 1)]!);
    const [a, b, c, d] = near as [number, number, number, number];
    let low = 0;
    let high = 1;
    for (let n = 0; n < 50; n++) {
      const middle = (low + high) / 2;
      if (cubic(a, b, c, d, middle) < level) low = middle;
      else high = middle;
    }
    times.push((i - 1 + high) * step_ms);
  }
  return times;
}

/** The largest (sign 1) or smallest (−1) value within [t0, t1] and when; between samples by the local parabola. */
export function extreme(series: Series, t0: number, t1: number, sign: number): { value: number; time_ms: number } {
  const { regular, step_ms, times_ms, extra } = series;
  let best = { value: -sign * Infinity, time_ms: NaN };
  const first = Math.ceil(t0 / step_ms - 1e-9);
  const last = Math.min(Math.floor(t1 / step_ms + 1e-9), regular.length - 1);
  let top = first;
  for (let i = first; i <= last; i++) if (sign * regular[i]! > sign * regular[top]!) top = i;
  if (top > first && top < last) {
    const [before, here, after] = [regular[top - 1]!, regular[top]!, regular[top + 1]!];
    const bend = before - 2 * here + after;
    const shift = bend === 0 ? 0 : (before - after) / (2 * bend);
    best = { value: here - ((before - after) * shift) / 4, time_ms: (top + shift) * step_ms };
  } else if (top >= first && top <= last) {
    best = { value: regular[top]!, time_ms: top * step_ms };
  }
  times_ms.forEach((t, i) => {
    if (t >= t0 && t <= t1 && sign * extra[i]! > sign * best.value) best = { value: extra[i]!, time_ms: t };
  });
  return best;
}

/** Integral over [t0, t1] of the course less its value at `baselineAt`; unit · ms. Trapezia over all known values. */
export function integral(series: Series, t0: number, t1: number, baselineAt: number | undefined): number {
  const { regular, step_ms, times_ms, extra } = series;
  const baseline = baselineAt === undefined ? 0 : extra[times_ms.indexOf(baselineAt)]!;
  const known: [number, number][] = times_ms.map((t, i) => [t, extra[i]!]);
  regular.forEach((value, i) => known.push([i * step_ms, value]));
  const within = known.filter(([t]) => t >= t0 && t <= t1).sort(([a], [b]) => a - b);
  let sum = 0;
  for (let i = 1; i < within.length; i++) {
    const [a, x] = within[i - 1]!;
    const [b, y] = within[i]!;
    sum += ((x + y) / 2 - baseline) * (b - a);
  }
  return sum;
}
