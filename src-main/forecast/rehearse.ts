// One sweep of a plan on the cell model: what the amplifier shows, what the membrane does, what the readings say.
import type { Trace } from '../contract/results.ts';
import { commandBreaks, sampledCommand } from '../protocol/command-course.ts';
import { readingInUnit, readingUnit, takeReading } from '../protocol/readings/take.ts';
import type { LaidSweep } from '../protocol/sweeps.ts';
import type { PreparedPlan } from '../solver/prepare.ts';
import type { SweepInput, SweepOutput, SweepState } from '../solver/run.ts';
import { runSweep } from '../solver/sweep.ts';
import { Refusal } from '../units/refuse.ts';
import { fromSi } from '../units/si.ts';
import { sweepClampMeter } from './clamp-sweep.ts';
import type { RehearsedSweep, SweepRehearsal } from './sweep-rehearsal.ts';
import { truthsOf, type Truths } from './truth.ts';

export interface RehearsalHooks {
  /** Polled every few steps; true ends the run. */
  readonly cancelled?: () => boolean;
  /** Where the sweep starts, when sweeps carry over: the `end` of the sweep before. */
  readonly start?: SweepState;
  /** Told now and then, 0 to 1. */
  readonly progress?: (done: number) => void;
}

/**
 * Rehearses one sweep. The same plan and sweep give the same bits, whichever worker runs them.
 *
 * @throws Refusal where the plan has no start: no operating point can be found.
 */
export function rehearseSweep(prepared: PreparedPlan, index: number, hooks: RehearsalHooks = {}): SweepRehearsal {
  const sweep = prepared.laidOut.sweep(index);
  if (hooks.start === undefined && !isStartFound(prepared, hooks.cancelled)) return { kind: 'cancelled', sweep: index };
  const meter = sweepClampMeter(prepared, sweep);
  const input = withHooks(prepared.input(index, hooks.start), hooks, sweep.samples, meter?.onSample);
  const run = runSweep(input);
  if (run.kind === 'cancelled') return { kind: 'cancelled', sweep: index };
  if (run.kind === 'diverged') return diverged(index, run);

  const { cancelled } = hooks;
  const { recorded, current } = run;
  const truths = truthsOf(prepared, sweep, { input, recorded, current, ...(cancelled && { cancelled }) });
  if (truths === 'cancelled') return { kind: 'cancelled', sweep: index };
  const end = afterInterval(prepared, index, run.end, hooks);
  if ('kind' in end) return end;
  return {
    kind: 'done',
    sweep: index,
    traces: tracesOf(prepared, sweep, run),
    clamp: meter === null ? null : meter.result(),
    readings: readingsOf(prepared, sweep, run, truths),
    largestCurrent_pA: current.map((I) => fromSi(largest(I), 'pA')),
    end,
  };
}

/** False when it was cancelled on the way: a second of a cell that fires on its own takes its time. */
function isStartFound(prepared: PreparedPlan, cancelled: (() => boolean) | undefined): boolean {
  try {
    prepared.start(cancelled);
    return true;
  } catch (error) {
    if (error instanceof Refusal && error.data.code === 'job-cancelled') return false;
    throw error;
  }
}

/** Samples between two words of progress. */
const samplesPerWord = 256;

function withHooks(
  input: SweepInput,
  hooks: RehearsalHooks,
  samples: number,
  onSample: SweepInput['onSample'],
): SweepInput {
  const { cancelled, progress } = hooks;
  return {
    ...input,
    ...(cancelled && { cancelled }),
    onSample: (index, V) => {
      onSample?.(index, V);
      if (progress && index % samplesPerWord === 0) progress(index / samples);
    },
  };
}

function diverged(sweep: number, { time, compartment }: { time: number; compartment: number }): SweepRehearsal {
  return { kind: 'diverged', sweep, time_ms: fromSi(time, 'ms'), compartment };
}

/** The cell's state at the next sweep's start: held through the interval when sweeps carry over. */
function afterInterval(
  prepared: PreparedPlan,
  index: number,
  end: SweepState,
  hooks: RehearsalHooks,
): SweepState | Exclude<SweepRehearsal, RehearsedSweep> {
  const { laidOut, plan } = prepared;
  const sweep = laidOut.sweep(index);
  const rest = laidOut.sweepInterval - sweep.duration;
  if (!plan.protocol.carryOver || index + 1 >= laidOut.count || rest <= 0) return end;
  const input = prepared.input(index, end);
  const run = runSweep({
    ...input,
    ...(hooks.cancelled && { cancelled: hooks.cancelled }),
    duration: rest,
    // Nothing is looked at on the way: samples at the ends alone, however long the interval is.
    sampling: rest,
    step: rest / Math.max(1, Math.ceil(rest / prepared.step - 1e-6)),
    probes: [],
    pipettes: input.pipettes.map((pipette) => {
      const holding = sweep.lanes.find((lane) => lane.pipette === pipette.letter)?.holding ?? NaN;
      return { ...pipette, command: [{ start: 0, end: rest, v0: holding, v1: holding }] };
    }),
  });
  if (run.kind === 'done') return run.end;
  if (run.kind === 'cancelled') return { kind: 'cancelled', sweep: index };
  return {
    kind: 'diverged',
    sweep: index,
    time_ms: fromSi(sweep.duration + run.time, 'ms'),
    compartment: run.compartment,
  };
}

function tracesOf(prepared: PreparedPlan, sweep: LaidSweep, run: SweepOutput): Trace[] {
  const { laidOut, pipettes, probes } = prepared;
  const trace = (key: string, unit: Trace['unit'], values: Float64Array): Trace => ({
    sweep: sweep.index,
    key,
    unit,
    start_ms: 0,
    interval_ms: fromSi(laidOut.sampling, 'ms'),
    values: values.map((value) => fromSi(value, unit)),
  });
  const none = new Float64Array();
  const ofPipettes = pipettes.flatMap(({ letter, mode }, p) => {
    const lane = sweep.lanes.find(({ pipette }) => pipette === letter);
    const command = sampledCommand(lane?.command ?? [], laidOut.sampling, run.samples);
    return [
      trace(`recording:${letter}`, mode === 'voltage clamp' ? 'pA' : 'mV', run.recorded[p] ?? none),
      trace(`command:${letter}`, lane?.unit ?? 'mV', command),
      trace(`membrane:${letter}`, 'mV', run.membrane[p] ?? none),
    ];
  });
  const ofProbes = probes.map(({ name }, i) =>
    trace(`membrane:${name}`, 'mV', run.membrane[pipettes.length + i] ?? none),
  );
  return [...ofPipettes, ...ofProbes];
}

function readingsOf(
  prepared: PreparedPlan,
  sweep: LaidSweep,
  run: SweepOutput,
  truths: Truths,
): RehearsedSweep['readings'] {
  const interval = prepared.laidOut.sampling;
  const breaks = commandBreaks(sweep.lanes.map(({ command }) => command));
  return prepared.plan.protocol.readings.map((reading) => {
    const p = prepared.pipettes.findIndex(({ letter }) => letter === reading.pipette);
    const unit = readingUnit(reading.measure, prepared.pipettes[p]?.mode ?? 'voltage clamp');
    const take = (values: Float64Array): number =>
      readingInUnit(takeReading(reading, { values, interval, breaks }, sweep), unit);
    const truth = truths[p];
    return { recorded: take(run.recorded[p] ?? new Float64Array()), truth: truth ? take(truth) : null };
  });
}

/** The value farthest from zero, with its sign. */
function largest(values: Float64Array): number {
  return values.reduce((far, value) => (Math.abs(value) > Math.abs(far) ? value : far), 0);
}
