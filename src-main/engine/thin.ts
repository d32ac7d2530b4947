import type { Trace } from '../contract/results.ts';

/**
 * A trace with at most `most` points: the least and the greatest value of each stretch, in the order they came, so that
 * a spike keeps its height. Two points stand for one stretch, half of it apart. Shorter traces pass as they are.
 */
export function thinned(trace: Trace, most: number): Trace {
  const { values } = trace;
  if (values.length <= most) return trace;
  const stretch = Math.ceil(values.length / Math.floor(most / 2));
  const stretches = Math.ceil(values.length / stretch);
  const kept = new Float64Array(2 * stretches);
  for (let s = 0; s < stretches; s += 1) {
    const end = Math.min((s + 1) * stretch, values.length);
    let least = s * stretch;
    let greatest = least;
    for (let i = least + 1; i < end; i += 1) {
      if (values[i]! < values[least]!) least = i;
      if (values[i]! > values[greatest]!) greatest = i;
    }
    kept[2 * s] = values[Math.min(least, greatest)]!;
    kept[2 * s + 1] = values[Math.max(least, greatest)]!;
  }
  return { ...trace, interval_ms: (trace.interval_ms * stretch) / 2, values: kept };
}

/** The part of a trace within [from, to], ms; either may be open. */
export function slice(trace: Trace, from_ms: number | undefined, to_ms: number | undefined): Trace {
  const { start_ms, interval_ms, values } = trace;
  // A millionth of an interval takes up the rounding of times such as 0.1 + 0.2.
  const first = from_ms === undefined ? 0 : Math.max(0, Math.ceil((from_ms - start_ms) / interval_ms - 1e-6));
  const last = to_ms === undefined ? values.length : Math.floor((to_ms - start_ms) / interval_ms + 1e-6) + 1;
  return { ...trace, start_ms: start_ms + first * interval_ms, values: values.slice(first, Math.max(first, last)) };
}
