// A sampled trace read as a course in time: straight between samples, except where a command edge may make it jump.
import type { Second } from '../../units/si.ts';
import type { TimeWindow } from '../window.ts';

/** Sample i stands at i·interval. A sample that falls on a break already shows what comes after it. */
export interface Sampled {
  readonly values: Float64Array;
  readonly interval: Second;
  /** Times at which the trace may jump, s, ascending: the edges of the commands. */
  readonly breaks: readonly Second[];
}

/** Times closer than this to a sample, in sampling intervals, are that sample. */
const sameSample = 1e-6;

/** A time in sampling intervals, snapped to the sample it means. */
function inSamples(time: Second, interval: Second): number {
  const at = time / interval;
  const nearest = Math.round(at);
  return Math.abs(at - nearest) <= sameSample ? nearest : at;
}

/** A straight stretch of the trace in units of samples. */
interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly atFrom: number;
  readonly atTo: number;
}

/**
 * The stretches of the interval between samples i and i + 1. Without a break: the chord. With one: up to it the line
 * through the two samples before it (through one, where there is no second since the last break), from it on the value
 * of sample i + 1. After the last sample the line goes on: a sweep need not end on a sample.
 */
function stretches(values: Float64Array, i: number, breaks: readonly number[], previousBroken: boolean): Stretch[] {
  const left = values[i] ?? NaN;
  const slope = previousBroken || i === 0 ? 0 : left - (values[i - 1] ?? NaN);
  const right = values[i + 1] ?? left + slope;
  const first = breaks[0];
  if (first === undefined) return [{ from: i, to: i + 1, atFrom: left, atTo: right }];
  const before = { from: i, to: first, atFrom: left, atTo: left + slope * (first - i) };
  return first === i + 1 ? [before] : [before, { from: first, to: i + 1, atFrom: right, atTo: right }];
}

/**
 * ∫ values dt over a window, exact for the straight-line course: partial samples at the edges count by the part inside.
 *
 * @returns in the unit of the values times s; NaN where the window leaves the trace.
 */
export function integral(trace: Sampled, window: TimeWindow): number {
  const { values, interval } = trace;
  const from = inSamples(window.from, interval);
  const to = inSamples(window.to, interval);
  if (!(from >= 0 && to >= from)) return NaN;
  const breaks = trace.breaks.map((time) => inSamples(time, interval));
  let next = breaks.findIndex((at) => at > Math.floor(from) - 1);
  if (next === -1) next = breaks.length;
  // Neumaier's compensated sum: 5·10⁷ samples must not lose digits.
  let sum = 0;
  let lost = 0;
  let previousBroken = false;
  for (let i = Math.max(0, Math.floor(from) - 1); i < to; i += 1) {
    const here: number[] = [];
    while (next < breaks.length && (breaks[next] ?? Infinity) <= i + 1) {
      const at = breaks[next] ?? Infinity;
      if (at > i) here.push(at);
      next += 1;
    }
    for (const stretch of stretches(values, i, here, previousBroken)) {
      const part = areaWithin(stretch, from, to);
      const total = sum + part;
      lost += Math.abs(sum) >= Math.abs(part) ? sum - total + part : part - total + sum;
      sum = total;
    }
    previousBroken = here.length > 0;
  }
  return (sum + lost) * interval;
}

function areaWithin(stretch: Stretch, from: number, to: number): number {
  const start = Math.max(stretch.from, from);
  const end = Math.min(stretch.to, to);
  if (end <= start) return 0;
  return (end - start) * (valueOn(stretch, start) + valueOn(stretch, end)) * 0.5;
}

function valueOn({ from, to, atFrom, atTo }: Stretch, at: number): number {
  return to === from ? atFrom : atFrom + ((atTo - atFrom) * (at - from)) / (to - from);
}

/**
 * The smallest and largest value in a window: its samples and, where an edge falls between two samples with no break
 * between them, the value interpolated there. The sample on the window's end is left out when a break falls on it: it
 * already shows the next block.
 *
 * @returns NaN twice where the window holds no value.
 */
export function extremes(trace: Sampled, window: TimeWindow): { readonly least: number; readonly most: number } {
  const { values, interval } = trace;
  const from = inSamples(window.from, interval);
  const to = inSamples(window.to, interval);
  const breaks = trace.breaks.map((time) => inSamples(time, interval));
  const broken = (i: number): boolean => breaks.some((at) => at > i && at <= i + 1);
  let least = Infinity;
  let most = -Infinity;
  const see = (value: number | undefined): void => {
    if (value === undefined) return;
    least = Math.min(least, value);
    most = Math.max(most, value);
  };
  for (const edge of [from, to]) {
    const i = Math.floor(edge);
    if (i === edge || broken(i)) continue;
    see(valueOn({ from: i, to: i + 1, atFrom: values[i] ?? NaN, atTo: values[i + 1] ?? NaN }, edge));
  }
  const last = breaks.includes(to) ? to - 1 : Math.floor(to);
  for (let i = Math.ceil(from); i <= last; i += 1) see(values[i]);
  return least <= most ? { least, most } : { least: NaN, most: NaN };
}
