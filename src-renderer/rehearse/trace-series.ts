import type { PipetteLetter } from '../../src-main/contract/documents.ts';
import type { Trace } from '../../src-main/contract/results.ts';
import { ladderPlace } from '../charts/paint.ts';
import type { Paint, Series } from '../charts/series.ts';
import type { SweepTraces } from './shown-run.ts';

/** Above this many pA a current is read in nA. */
const inNanoamperes = 2000;

export interface Scaling {
  readonly unit: string;
  readonly factor: number;
}

/** The unit a set of traces is best read in: nA for large currents, else their own. */
export function scalingOf(traces: readonly Trace[]): Scaling {
  const own = traces[0]?.unit ?? 'mV';
  if (own === 'mV') return { unit: 'mV', factor: 1 };
  let largest = 0;
  for (const trace of traces) for (const value of trace.values) largest = Math.max(largest, Math.abs(value) || 0);
  return largest > inNanoamperes ? { unit: 'nA', factor: 1e-3 } : { unit: 'pA', factor: 1 };
}

/** A trace as a series, in the scaling's unit. */
export function traceSeries(trace: Trace, scaling: Scaling, look: Omit<Series, 'x' | 'y' | 'drawn'>): Series {
  return {
    ...look,
    x: { start: trace.start_ms, interval: trace.interval_ms },
    y: scaling.factor === 1 ? trace.values : trace.values.map((value) => value * scaling.factor),
    drawn: 'line',
  };
}

function hue(letter: PipetteLetter): Paint {
  return { token: letter === 'A' ? '--a' : '--b' };
}

/**
 * One pipette's recording in every sweep, from light to dark along the ladder, the selected one on top in
 * the fullest hue. Colours go by the
 * number of sweeps planned, so that a sweep keeps its colour while others arrive.
 */
export function recordedFamily(
  sweeps: ReadonlyMap<number, SweepTraces>,
  letter: PipetteLetter,
  selected: number,
  planned: number,
): { series: Series[]; unit: string } {
  const traces = [...sweeps].flatMap(([sweep, byKey]) => {
    const trace = byKey.get(`recording:${letter}`);
    return trace ? [{ sweep, trace }] : [];
  });
  const scaling = scalingOf(traces.map((one) => one.trace));
  const series = traces.map(({ sweep, trace }) =>
    traceSeries(trace, scaling, {
      key: String(sweep),
      label: sweep === selected ? `sweep ${sweep + 1}, as recorded` : `sweep ${sweep + 1}`,
      paint:
        traces.length === 1 && planned === 1
          ? hue(letter)
          : { sweeps: letter === 'A' ? 'a' : 'b', at: sweep === selected ? 1 : 0.85 * ladderPlace(sweep, planned) },
      stroke: letter === 'A' ? 'solid' : 'dashed',
      selected: sweep === selected,
      quiet: sweep !== selected,
    }),
  );
  return { series, unit: scaling.unit };
}

const probeTokens = ['--seq-1', '--seq-3', '--seq-5', '--seq-0', '--seq-4', '--seq-2'];

/** Command and membrane at the pipettes and probes in one sweep: what the clamp was told and what the membrane did. */
export function voltageSeries(sweep: SweepTraces): Series[] {
  const plain = { unit: 'mV', factor: 1 };
  const series: Series[] = [];
  let probes = 0;
  for (const [key, trace] of sweep) {
    if (trace.unit !== 'mV') continue;
    const [kind = '', ...rest] = key.split(':');
    const name = rest.join(':');
    if (kind === 'command') {
      series.push(
        traceSeries(trace, plain, {
          key,
          label: `command ${name}, dial`,
          paint: { token: '--ink-3' },
          stroke: name === 'B' ? 'dashed' : 'solid',
        }),
      );
    } else if (kind === 'membrane' && (name === 'A' || name === 'B')) {
      series.push(
        traceSeries(trace, plain, {
          key,
          label: `membrane at ${name}`,
          paint: hue(name),
          stroke: name === 'A' ? 'solid' : 'dashed',
          selected: true,
        }),
      );
    } else if (kind === 'membrane') {
      const token = probeTokens[probes % probeTokens.length] ?? '--ink';
      probes += 1;
      series.push(traceSeries(trace, plain, { key, label: name, paint: { token }, stroke: 'dotted', selected: true }));
    }
  }
  return series;
}

function varies(trace: Trace): boolean {
  const first = trace.values[0];
  return trace.values.some((value) => value !== first);
}

/** Injected currents of one sweep: the commands of pipettes in current clamp, where they are not the same throughout. */
export function injectedSeries(sweep: SweepTraces): { series: Series[]; unit: string } {
  const traces = [...sweep].filter(
    ([key, trace]) => key.startsWith('command:') && trace.unit === 'pA' && varies(trace),
  );
  const scaling = scalingOf(traces.map(([, trace]) => trace));
  const series = traces.map(([key, trace]) => {
    const letter = key.endsWith('B') ? 'B' : 'A';
    return traceSeries(trace, scaling, {
      key,
      label: `injected by ${letter}`,
      paint: hue(letter),
      stroke: letter === 'A' ? 'solid' : 'dashed',
    });
  });
  return { series, unit: scaling.unit };
}
