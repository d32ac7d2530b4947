// How far two sets of figures of a reference sweep are apart, each difference in units of its tolerance.
import type { ReferenceMeasure, ReferenceSweep } from '../../src-main/exchange/reference-case.ts';
import { isVoltage, type Figures, type MeasuredFigure } from './figures.ts';

/** mV; suggested by the producer for passive cells, and what a fine step leaves in cells with gates. */
const passiveTolerance_mV = 0.01;
const gatedTolerance_mV = 0.05;
/** Around a spike the voltage is judged by the spike's time and height instead. */
const aroundSpike_ms = 2;
const spikeTimeTolerance_ms = 0.01;
const spikePeakTolerance_mV = 0.1;
/** Of the span of the trace: currents, charges and the times of blunt extremes. */
const shareTolerance = 1e-3;

/** Worst differences; `worst` is the largest in units of its tolerance, so that 1 is the limit. */
export interface Difference {
  readonly voltage_mV: number;
  readonly spike_ms: number;
  readonly peak_mV: number;
  /** Currents and other measures, per cent of their span. */
  readonly share_percent: number;
  readonly worst: number;
  readonly worstWhere: string;
}

export const noDifference: Difference = {
  ...{ voltage_mV: 0, spike_ms: 0, peak_mV: 0, share_percent: 0, worst: 0, worstWhere: '' },
};

/** The worse of two, part by part. */
export function worseOf(a: Difference, b: Difference): Difference {
  const lead = b.worst > a.worst ? b : a;
  return {
    voltage_mV: Math.max(a.voltage_mV, b.voltage_mV),
    spike_ms: Math.max(a.spike_ms, b.spike_ms),
    peak_mV: Math.max(a.peak_mV, b.peak_mV),
    share_percent: Math.max(a.share_percent, b.share_percent),
    worst: lead.worst,
    worstWhere: lead.worstWhere,
  };
}

/** What the case holds, in the form that a computation gives. */
export function storedFigures(sweep: ReferenceSweep): Figures {
  const spikes: Record<string, readonly number[]> = {};
  for (const measure of sweep.measures) {
    if (measure.kind === 'crossings' && measure.level === 0 && isVoltage(measure.key))
      spikes[measure.key] = measure.values;
  }
  return {
    step_us: 0,
    traces: Object.fromEntries(Object.entries(sweep.traces).map(([key, values]) => [key, Float64Array.from(values)])),
    measures: sweep.measures.map((measure): MeasuredFigure => {
      if (measure.kind === 'crossings') return { kind: 'list', values: measure.values };
      if (measure.kind === 'peak') return { kind: 'peak', value: measure.value, time_ms: measure.time_ms };
      return { kind: 'number', value: measure.value };
    }),
    spikes,
  };
}

/** How far `figures` are from `truth`. Spikes of either one count; a spike too many or too few is infinitely far. */
export function differenceOf(sweep: ReferenceSweep, gated: boolean, figures: Figures, truth: Figures): Difference {
  const voltageTolerance = gated ? gatedTolerance_mV : passiveTolerance_mV;
  const spikesOf = (key: string): readonly number[] => [...(figures.spikes[key] ?? []), ...(truth.spikes[key] ?? [])];
  let worst = noDifference;
  const note = (part: Partial<Difference>, ratio: number, worstWhere: string): void => {
    // Not a number is as wrong as can be.
    const counted = Number.isNaN(ratio) ? Infinity : ratio;
    worst = worseOf(worst, { ...noDifference, ...part, worst: counted, worstWhere });
  };
  for (const [key, values] of Object.entries(truth.traces)) {
    const own = figures.traces[key]!;
    const spikes = spikesOf(key);
    const span = spanOf(values);
    sweep.sampleTimes_ms.forEach((t, i) => {
      const apart = Math.abs(own[i]! - values[i]!);
      const where = `${sweep.name}, ${key} at ${t} ms`;
      if (!isVoltage(key)) {
        const share = apart === 0 ? 0 : apart / span;
        note({ share_percent: 100 * share }, share / shareTolerance, where);
      } else if (!(gated && spikes.some((spike) => Math.abs(spike - t) <= aroundSpike_ms))) {
        note({ voltage_mV: apart }, apart / voltageTolerance, where);
      }
    });
  }
  sweep.measures.forEach((measure, m) => {
    const own = figures.measures[m]!;
    const other = truth.measures[m]!;
    const where = `${sweep.name}, ${measure.name}`;
    if (own.kind === 'list' && other.kind === 'list') {
      const apart =
        own.values.length === other.values.length
          ? own.values.reduce((most, t, i) => Math.max(most, Math.abs(t - other.values[i]!)), 0)
          : Infinity;
      note({ spike_ms: apart }, apart / spikeTimeTolerance_ms, where);
    } else if (own.kind !== 'list' && other.kind !== 'list') {
      noteNumber(measure, own, other, where);
    }
  });
  return worst;

  function noteNumber(
    measure: ReferenceMeasure,
    own: Exclude<MeasuredFigure, { kind: 'list' }>,
    other: Exclude<MeasuredFigure, { kind: 'list' }>,
    where: string,
  ): void {
    const apart = Math.abs(own.value - other.value);
    const spike = other.kind === 'peak' && other.value > 0 && spikesOf(measure.key).length > 0;
    if (isVoltage(measure.key) && measure.kind !== 'integral') {
      if (spike) note({ peak_mV: apart }, apart / spikePeakTolerance_mV, where);
      else note({ voltage_mV: apart }, apart / voltageTolerance, where);
    } else {
      const stored = truth.traces[measure.key];
      const span =
        stored === undefined || measure.kind === 'integral' ? Math.abs(other.value) : spanOf(stored, other.value);
      const share = apart === 0 ? 0 : apart / span;
      note({ share_percent: 100 * share }, share / shareTolerance, where);
    }
    if (own.kind === 'peak' && other.kind === 'peak' && measure.kind === 'peak') {
      // The top of a blunt extreme is flat: its time is known only to the share of the window.
      const late = Math.abs(own.time_ms - other.time_ms);
      const allowed = Math.max(spikeTimeTolerance_ms, spike ? 0 : shareTolerance * (measure.t1 - measure.t0));
      note(spike ? { spike_ms: late } : {}, late / allowed, `${where}, its time`);
    }
  }
}

function spanOf(values: Float64Array, ...others: number[]): number {
  let low = Math.min(...others);
  let high = Math.max(...others);
  for (const value of values) {
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  return high - low;
}
