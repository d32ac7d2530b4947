import type { Second } from '../units/si.ts';
import {
  addedCapacitance,
  addToPivot,
  addToRight,
  commandAt,
  electrodesOf,
  nodeSolution,
  turnPieces,
  type Electrode,
} from './electrodes.ts';
import { defaultSpacing } from './gate-rows.ts';
import { advanceGates, gatedChannels, gateStates, membraneOf, type Membrane } from './membrane.ts';
import { keep, keptRoom, recorderOf } from './recorder.ts';
import type { SweepInput, SweepResult } from './run.ts';
import { timelineOf, timeOfStep } from './timeline.ts';
import { eliminate, reduce, substitute, treeOf, type Tree } from './tree.ts';

/**
 * Regular steps after a break that are damped. What is left of a mode that decays within the step is at worst 1.7e-4
 * of the jump with four (0.5 % with two), and smooth responses lose little (measured: tests/analytic/clamp-steps).
 */
export const dampedSteps = 4;
/** Compartment-steps between two looks at `cancelled`: a few milliseconds. */
const workBetweenPolls = 100_000;

/** Everything a step needs, allocated once. Rows k: compartment k. */
interface Workspace {
  readonly tree: Tree;
  readonly membrane: Membrane;
  readonly electrodes: readonly Electrode[];
  readonly capacitance: Float64Array;
  /** Conductances that never change: ohmic channels and couplings. */
  readonly fixedD: Float64Array;
  readonly fixedR: Float64Array;
  readonly V: Float64Array;
  readonly D: Float64Array;
  readonly R: Float64Array;
  readonly inverse: Float64Array;
  /** The right side without capacity current, for the second half of a damped step. */
  readonly driven: Float64Array;
}

/**
 * One sweep of a cell under its pipettes.
 *
 * Gates and voltages are staggered by half a step: gates go exactly exponentially at the voltage in between, voltages by
 * Crank–Nicolson as a backward half step and an extrapolation. After every jump or bend of a command, and at the start,
 * the first few steps are two backward half steps instead, with the same matrix, so that fast modes die out instead of
 * ringing. Second order in the step. The same input gives the same bits.
 *
 * Regular samples lie at 0, 1, 2 … sampling intervals up to and including the duration. At a jump a sample has what
 * holds from there on. The charge that a jump puts on a capacitance at once has no width and is in no sample.
 *
 * @throws Refusal `quantity-out-of-range` for two ideal voltage clamps in one compartment.
 * @throws Error where the step does not divide the sampling interval.
 * @source Staggering: Hines M (1984), Int J Biomed Comput 15:69–76. Damping: Rannacher R (1984), Numer Math 43:309–327.
 *         Both from memory.
 */
export function runSweep(input: SweepInput): SweepResult {
  const { grid } = input;
  const extraTimes = input.extraTimes ?? new Float64Array(0);
  const timeline = timelineOf({ ...input, commands: input.pipettes.map(({ command }) => command), extraTimes });
  const { step, stepsPerSample, stops } = timeline;
  const slack = 1e-6 * step;
  const work = workspaceOf(input, step);
  const { V, membrane, electrodes } = work;
  const recorder = recorderOf(input, membrane, electrodes, work.capacitance);
  const regular = keptRoom(recorder, timeline.samples);
  const extra = input.extraTimes === undefined ? null : keptRoom(recorder, extraTimes.length);
  const stepsBetweenPolls = Math.max(1, Math.floor(workBetweenPolls / grid.count));

  // Place in time: regular steps done, and the part of the next one.
  let done = 0;
  let rest = 0;
  let time: Second = 0;
  let next = 0;
  // The step before, half of which the gates are behind; 0 after a break, where they are brought up to date.
  let before: Second = 0;
  let dampedUntil = dampedSteps;
  let countdown = stepsBetweenPolls;

  turnPieces(electrodes, 0, slack);
  impose(electrodes, V, 0);
  for (;;) {
    const stop = stops[next]!;
    const atStop = stop.grid === done && stop.rest === rest;
    if (atStop) {
      time = stop.time;
      if (stop.breaks) {
        bringGatesUp(work, before / 2);
        before = 0;
        turnPieces(electrodes, time, slack);
        impose(electrodes, V, time);
        dampedUntil = done + rest + dampedSteps;
      }
    }
    const now = { time, V, ahead: before / 2 };
    if (rest === 0 && done % stepsPerSample === 0) {
      const index = done / stepsPerSample;
      if (index < timeline.samples) {
        keep(recorder, regular, index, now);
        input.onSample?.(index, V);
      }
    }
    if (atStop) {
      if (extra !== null) for (const index of stop.extras) keep(recorder, extra, index, now);
      next++;
      if (next === stops.length) break;
    }

    if (--countdown === 0) {
      countdown = stepsBetweenPolls;
      if (input.cancelled?.() === true) return { kind: 'cancelled' };
    }

    const ahead = stops[next]!;
    const whole = rest === 0 && (ahead.grid > done || (ahead.grid === done && ahead.rest === 0));
    const toStop = ahead.grid === done && ahead.rest > rest;
    const h = whole ? step : ((toStop ? ahead.rest : 1) - rest) * step;
    const damped = done + rest < dampedUntil - 1e-9;
    if (toStop) {
      rest = ahead.rest;
    } else {
      done++;
      rest = 0;
    }
    const end = toStop ? ahead.time : timeOfStep(timeline, done);
    if (!takeStep(work, { time, h, end, advance: before === h ? h : (before + h) / 2, damped })) {
      return { kind: 'diverged', time: end, compartment: whereItBroke(work) };
    }
    time = end;
    before = h;
  }
  bringGatesUp(work, before / 2);
  return {
    kind: 'done',
    ...regular,
    extra,
    end: {
      V: V.slice(),
      gates: gateStates(membrane, grid.count),
      pipetteV: Float64Array.from(electrodes, (electrode) =>
        electrode.way === 'behind a node' ? electrode.nodeV : V[electrode.compartment]!,
      ),
    },
  };
}

function workspaceOf(input: SweepInput, step: Second): Workspace {
  const { grid, start } = input;
  const { count } = grid;
  const electrodes = electrodesOf(input.pipettes, start);
  const membrane = membraneOf({ ...input, advances: [step, step / 2], spacing: input.tableSpacing ?? defaultSpacing });
  const fixedD = new Float64Array(count);
  const fixedR = new Float64Array(count);
  const gated = new Set(gatedChannels(grid, input.kinetics).map(({ name }) => name));
  for (const { channel, conductance, reversal } of grid.conductances) {
    if (gated.has(channel)) continue;
    for (let k = 0; k < count; k++) {
      fixedD[k] = fixedD[k]! + conductance[k]!;
      fixedR[k] = fixedR[k]! + conductance[k]! * reversal[k]!;
    }
  }
  for (let k = 1; k < count; k++) {
    const p = grid.parent[k]!;
    fixedD[k] = fixedD[k]! + grid.coupling[k]!;
    fixedD[p] = fixedD[p]! + grid.coupling[k]!;
  }
  const capacitance = Float64Array.from(grid.capacitance);
  for (const electrode of electrodes) {
    capacitance[electrode.compartment] = capacitance[electrode.compartment]! + addedCapacitance(electrode);
  }
  const imposed = electrodes.filter(({ way }) => way === 'imposed').map(({ compartment }) => compartment);
  return {
    tree: treeOf(grid, imposed),
    membrane,
    electrodes,
    capacitance,
    fixedD,
    fixedR,
    V: Float64Array.from(start.V),
    D: new Float64Array(count),
    R: new Float64Array(count),
    inverse: new Float64Array(count),
    driven: new Float64Array(count),
  };
}

/** Ideal clamps put their compartments where the command is. */
function impose(electrodes: readonly Electrode[], V: Float64Array, time: Second): void {
  for (const electrode of electrodes) {
    if (electrode.way === 'imposed') V[electrode.compartment] = commandAt(electrode, time);
  }
}

/** Takes the gates the half step they are behind; the rows they fill are scratch here. */
function bringGatesUp(work: Workspace, advance: Second): void {
  if (advance > 0) advanceGates(work.membrane, advance, work.V, work.D, work.R);
}

/** One step from `time` to `end`. False where the voltages are no longer finite. */
function takeStep(
  work: Workspace,
  at: {
    readonly time: Second;
    readonly h: Second;
    readonly end: Second;
    readonly advance: Second;
    readonly damped: boolean;
  },
): boolean {
  const { tree, electrodes, capacitance, fixedD, fixedR, V, D, R, inverse, driven } = work;
  const { count } = tree;
  const weight = 2 / at.h;
  const middle = at.time + at.h / 2;
  for (let k = 0; k < count; k++) {
    D[k] = fixedD[k]! + weight * capacitance[k]!;
    R[k] = fixedR[k]!;
  }
  advanceGates(work.membrane, at.advance, V, D, R);
  if (at.damped) driven.set(R);
  for (const electrode of electrodes) addToPivot(electrode, D, weight);
  for (let k = 0; k < count; k++) R[k] = R[k]! + weight * capacitance[k]! * V[k]!;
  addElectrodes(electrodes, R, middle, weight);
  imposeRows(electrodes, D, R, middle);
  eliminate(tree, D, R, inverse);
  substitute(tree, R, inverse);
  if (at.damped) {
    moveNodes(electrodes, R, middle, weight, false);
    for (let k = 0; k < count; k++) R[k] = driven[k]! + weight * capacitance[k]! * R[k]!;
    addElectrodes(electrodes, R, at.end, weight);
    imposeRows(electrodes, D, R, at.end);
    reduce(tree, R, inverse);
    substitute(tree, R, inverse);
    moveNodes(electrodes, R, at.end, weight, false);
    for (let k = 0; k < count; k++) V[k] = R[k]!;
  } else {
    moveNodes(electrodes, R, middle, weight, true);
    for (let k = 0; k < count; k++) V[k] = 2 * R[k]! - V[k]!;
  }
  // A fault anywhere reaches the root in the same solve.
  const finite = Number.isFinite(R[0]);
  impose(electrodes, V, at.end);
  return finite;
}

function addElectrodes(electrodes: readonly Electrode[], R: Float64Array, time: Second, weight: number): void {
  for (const electrode of electrodes) addToRight(electrode, R, commandAt(electrode, time), weight);
}

function imposeRows(electrodes: readonly Electrode[], D: Float64Array, R: Float64Array, time: Second): void {
  for (const electrode of electrodes) {
    if (electrode.way !== 'imposed') continue;
    D[electrode.compartment] = 1;
    R[electrode.compartment] = commandAt(electrode, time);
  }
}

function moveNodes(
  electrodes: readonly Electrode[],
  x: Float64Array,
  time: Second,
  weight: number,
  extrapolate: boolean,
): void {
  for (const electrode of electrodes) {
    if (electrode.way !== 'behind a node') continue;
    const solution = nodeSolution(electrode, x[electrode.compartment]!, commandAt(electrode, time), weight);
    electrode.nodeV = extrapolate ? 2 * solution - electrode.nodeV : solution;
  }
}

/** The compartment whose own gate or command is not finite; the solve has spread the fault to all others. */
function whereItBroke(work: Workspace): number {
  for (const channel of work.membrane.channels) {
    for (const state of channel.states) {
      const i = state.findIndex((x) => !Number.isFinite(x));
      if (i >= 0) return channel.at[i]!;
    }
  }
  return work.electrodes[0]?.compartment ?? 0;
}
