// One reference sweep computed at one step: the same traces and measures as the case holds, in its units.
import type { CommandPiece } from '../../src-main/protocol/command.ts';
import { preparePlan } from '../../src-main/solver/prepare.ts';
import type { SweepOutput } from '../../src-main/solver/run.ts';
import { runSweep } from '../../src-main/solver/sweep.ts';
import type { ReferenceMeasure, ReferenceSweep } from '../../src-main/exchange/reference-case.ts';
import { crossings, extreme, integral, type Series } from './measures.ts';

export interface Figures {
  /** Seconds actually stepped, µs. */
  readonly step_us: number;
  /** At the case's sample times. */
  readonly traces: Readonly<Record<string, Float64Array>>;
  /** In the case's order; crossings give their list. */
  readonly measures: readonly MeasuredFigure[];
  /** Upward crossings of 0 mV by voltage key, ms. */
  readonly spikes: Readonly<Record<string, readonly number[]>>;
}

export type MeasuredFigure =
  | { readonly kind: 'number'; readonly value: number }
  | { readonly kind: 'list'; readonly values: readonly number[] }
  | { readonly kind: 'peak'; readonly value: number; readonly time_ms: number };

/** Just before a jump, ms: what holds up to it. */
const justBefore_ms = 1e-6;

/**
 * Runs the sweep's plan at `step_us`. Every stored sample time is a step of its own, so nothing is interpolated there;
 * measures are taken from samples at every step.
 *
 * @throws Error where the run does not finish or a key is unknown.
 */
export function figuresOf(sweep: ReferenceSweep, step_us: number): Figures {
  const plan = { ...sweep.plan, step_us, protocol: { ...sweep.plan.protocol, sampling_us: step_us } };
  const input = preparePlan(plan).input(0);
  const keys = [...new Set([...Object.keys(sweep.traces), ...sweep.measures.map(({ key }) => key)])];
  const channelKeys = keys.filter((key) => key.startsWith('channel:'));
  const times_ms = extraTimes(
    sweep,
    input.pipettes.map(({ command }) => command),
  );
  const result = runSweep({
    ...input,
    extraTimes: Float64Array.from(times_ms, (t) => t / 1e3),
    channelProbes: channelKeys.map((key) => {
      const [, compartment = '', channel = ''] = key.split(':');
      return [input.grid.compartmentAt({ compartment }, key), channel] as const;
    }),
  });
  if (result.kind !== 'done') throw new Error(`the run ended as ${result.kind}`);

  const source: Source = { sweep, result, step_ms: step_us / 1e3, times_ms, channelKeys, commands: input.pipettes };
  const series = new Map(keys.map((key) => [key, seriesOf(source, key)]));
  const at = new Map(times_ms.map((t, i) => [t, i]));
  const traces = Object.fromEntries(
    Object.keys(sweep.traces).map((key) => [
      key,
      Float64Array.from(sweep.sampleTimes_ms, (t) => series.get(key)!.extra[at.get(t)!]!),
    ]),
  );
  return {
    step_us,
    traces,
    measures: sweep.measures.map((measure) => measured(measure, series.get(measure.key)!)),
    spikes: Object.fromEntries(keys.filter(isVoltage).map((key) => [key, crossings(series.get(key)!, 0)])),
  };
}

export function isVoltage(key: string): boolean {
  return key.startsWith('V:') || key.endsWith(':V');
}

/** Sample times, the times measures ask for, and the last moments before every jump; ms, ascending, each once. */
function extraTimes(sweep: ReferenceSweep, commands: readonly (readonly CommandPiece[])[]): number[] {
  const asked = sweep.measures.flatMap((measure) => {
    if (measure.kind === 'at') return [measure.t];
    if (measure.kind === 'peak') return [measure.t0, measure.t1];
    if (measure.kind === 'integral') return [measure.t0, measure.t1, measure.baselineAt ?? measure.t0];
    return [];
  });
  const jumps = commands.flatMap((pieces) => pieces.map(({ end }) => 1e3 * end - justBefore_ms));
  const all = [...sweep.sampleTimes_ms, ...asked, ...jumps].filter((t) => t >= 0 && t <= sweep.tEnd_ms);
  return [...new Set(all)].sort((a, b) => a - b);
}

interface Source {
  readonly sweep: ReferenceSweep;
  readonly result: SweepOutput;
  readonly step_ms: number;
  readonly times_ms: readonly number[];
  readonly channelKeys: readonly string[];
  readonly commands: readonly { readonly mode: string; readonly command: readonly CommandPiece[] }[];
}

function seriesOf(source: Source, key: string): Series {
  const { sweep, result, step_ms, times_ms } = source;
  const inTrade = (of: (kept: Kept) => Float64Array | undefined, scale: number): Series => {
    const regular = of(result);
    const extra = result.extra === null ? undefined : of(result.extra);
    if (regular === undefined || extra === undefined) throw new Error(`nothing recorded under ${key}`);
    return { step_ms, regular: regular.map((x) => x * scale), times_ms, extra: extra.map((x) => x * scale) };
  };
  if (key.startsWith('V:')) {
    const probe = sweep.plan.probes.findIndex(({ name }) => name === key);
    return inTrade(({ membrane }) => membrane[source.commands.length + probe], 1e3);
  }
  if (key.startsWith('channel:')) {
    const index = source.channelKeys.indexOf(key);
    return inTrade(({ channelCurrents }) => channelCurrents[index], 1e12);
  }
  const [, electrode = '', quantity] = key.split(':');
  const p = sweep.letters[electrode] === 'B' ? 1 : 0;
  if (quantity === 'I') return inTrade(({ current }) => current[p], 1e12);
  const { mode, command } = source.commands[p]!;
  if (mode === 'current clamp') return inTrade(({ recorded }) => recorded[p], 1e3);
  const level = (t_ms: number): number => 1e3 * commandLevel(command, t_ms / 1e3);
  const regular = Float64Array.from({ length: result.samples }, (_, i) => level(i * step_ms));
  return { step_ms, regular, times_ms, extra: Float64Array.from(times_ms, level) };
}

type Kept = Pick<SweepOutput, 'recorded' | 'current' | 'membrane' | 'channelCurrents'>;

function commandLevel(command: readonly CommandPiece[], time: number): number {
  const piece = command.find(({ end }) => time < end - 1e-12) ?? command.at(-1);
  if (piece === undefined) return 0;
  return (
    piece.v0 +
    ((piece.v1 - piece.v0) * Math.min(time - piece.start, piece.end - piece.start)) / (piece.end - piece.start)
  );
}

function measured(measure: ReferenceMeasure, series: Series): MeasuredFigure {
  switch (measure.kind) {
    case 'at':
      return { kind: 'number', value: series.extra[series.times_ms.indexOf(measure.t)]! };
    case 'crossings':
      return { kind: 'list', values: crossings(series, measure.level) };
    case 'peak':
      return { kind: 'peak', ...extreme(series, measure.t0, measure.t1, measure.sign) };
    case 'integral':
      return { kind: 'number', value: integral(series, measure.t0, measure.t1, measure.baselineAt) };
    default:
      return measure satisfies never;
  }
}
