import type { Grid } from '../cell/grid.ts';
import type { Kinetics } from '../channels/kinetics.ts';
import { refuse } from '../units/refuse.ts';
import type { Second, Volt } from '../units/si.ts';
import { refuseRivals, wayOf } from './electrodes.ts';
import { gatedChannels } from './membrane.ts';
import type { SolverPipette, SweepState } from './run.ts';
import { isStable } from './stability.ts';
import { steadyMembrane } from './steady-membrane.ts';
import { runSweep } from './sweep.ts';
import { eliminate, substitute, treeOf } from './tree.ts';

/** A pipette that stays at one level: V in voltage clamp, A in current clamp. */
export interface HeldPipette extends Omit<SolverPipette, 'command'> {
  readonly holding: number;
}

export interface OperatingInput {
  readonly grid: Grid;
  readonly kinetics: ReadonlyMap<string, Kinetics>;
  /** °C. */
  readonly temperature: number;
  readonly pipettes: readonly HeldPipette[];
  /** For the second that a cell which fires on its own is simulated; 25 µs when absent. */
  readonly step?: Second;
  readonly cancelled?: () => boolean;
}

export interface OperatingPoint {
  /** Without gates where the cell is steady: they are steady too. */
  readonly state: SweepState;
  /** No steady state is stable here; the state is one moment of its activity. */
  readonly firesOnItsOwn: boolean;
}

/** Where the search begins, V: of several stable states the one reached from here counts. */
const searchStart: Volt = -0.07;
/** A voltage change below this, V, ends the search: rounding of a level in mV. */
const settled: Volt = 1e-12;
const mostIterations = 1000;
/** No iteration moves a compartment further, V. */
const longestMove: Volt = 0.01;
/** How far an unstable cell is pushed, and for how long it is let go. */
const push: Volt = 1e-4;
const letGo: Second = 1;

/**
 * The true steady state of a cell with all pipettes at their holding levels.
 *
 * Found, not waited for: implicit steps in time with all gates steady, growing into Newton's method, from −70 mV
 * everywhere. Where the state found is unstable the cell is pushed by 0.1 mV and simulated for one second; if it has
 * then come to rest at a stable state, that is the answer, else the state it is in at that moment.
 *
 * @throws Refusal `run-diverged` where no steady state was found, `quantity-out-of-range` for two ideal clamps in one
 *         compartment, `job-cancelled` when `cancelled` said so.
 * @source Pseudo-transient continuation: Kelley CT, Keyes DE (1998), SIAM J Numer Anal 35:508–523 (from memory).
 */
export function operatingPoint(input: OperatingInput): OperatingPoint {
  refuseRivals(input.pipettes);
  const { grid, kinetics, temperature, pipettes } = input;
  const steadyAt = (V: Float64Array): boolean =>
    isStable(grid, steadyMembrane(grid, kinetics, temperature, V), pipettes);
  const found = steadyVoltages(input, new Float64Array(grid.count).fill(searchStart));
  if (steadyAt(found)) return { state: stateOf(found, pipettes), firesOnItsOwn: false };

  const state = letGoFrom(input, found);
  const rest = steadyVoltages(input, state.V);
  const atRest = rest.every((V, k) => Math.abs(V - state.V[k]!) < push);
  return atRest && steadyAt(rest)
    ? { state: stateOf(rest, pipettes), firesOnItsOwn: false }
    : { state, firesOnItsOwn: true };
}

function stateOf(V: Float64Array, pipettes: readonly HeldPipette[]): SweepState {
  const pipetteV = Float64Array.from(pipettes, (pipette) => {
    const own = V[pipette.compartment]!;
    return wayOf(pipette) === 'behind a node' ? own + pipette.holding * pipette.access : own;
  });
  return { V, pipetteV };
}

function letGoFrom(input: OperatingInput, found: Float64Array): SweepState {
  const { grid, kinetics, temperature, pipettes } = input;
  const step = input.step ?? 25e-6;
  const gates = gatedChannels(grid, kinetics).map((channel) =>
    channel.kinetics.gates.map((gate) => found.map((V) => gate.inf(1e3 * V))),
  );
  const result = runSweep({
    grid,
    kinetics,
    temperature,
    pipettes: pipettes.map(({ holding, ...pipette }) => ({
      ...pipette,
      command: [{ start: 0, end: letGo, v0: holding, v1: holding }],
    })),
    duration: letGo,
    sampling: letGo / Math.round(letGo / step),
    step: letGo / Math.round(letGo / step),
    start: { V: found.map((V) => V + push), gates, pipetteV: stateOf(found, pipettes).pipetteV! },
    probes: [],
    ...(input.cancelled === undefined ? {} : { cancelled: input.cancelled }),
  });
  if (result.kind === 'done') return result.end;
  if (result.kind === 'cancelled') return refuseCancelled();
  return refuse('run-diverged', {
    thing: 'membrane voltage',
    place: `before the first sweep, t = ${(result.time * 1e3).toPrecision(4)} ms, compartment ${result.compartment}`,
    value: 'not a finite number',
    remedy: "look at that compartment's channels and rates",
  });
}

function refuseCancelled(): never {
  return refuse('job-cancelled', {
    thing: 'search for the operating point',
    place: 'before the first sweep',
    value: 'cancelled',
    remedy: 'start again when wanted',
  });
}

/** Voltages at which no current is left over, all gates steady. Reached from `from` the way the membrane would go. */
function steadyVoltages(input: OperatingInput, from: Float64Array): Float64Array {
  const { grid, kinetics, temperature, pipettes } = input;
  const { count, parent, coupling, capacitance } = grid;
  const imposed = pipettes.filter((pipette) => wayOf(pipette) === 'imposed');
  const tree = treeOf(
    grid,
    imposed.map(({ compartment }) => compartment),
  );
  const V = Float64Array.from(from);
  for (const { compartment, holding } of imposed) V[compartment] = holding;
  const D = new Float64Array(count);
  const R = new Float64Array(count);
  const inverse = new Float64Array(count);
  let pace: Second = 1e-4;
  let lastRate = Infinity;
  for (let iteration = 0; iteration < mostIterations; iteration++) {
    if (input.cancelled?.() === true) refuseCancelled();
    const { current, slope } = steadyMembrane(grid, kinetics, temperature, V);
    for (let k = 0; k < count; k++) {
      D[k] = slope[k]! + capacitance[k]! / pace;
      R[k] = -current[k]!;
    }
    for (let k = 1; k < count; k++) {
      const p = parent[k]!;
      const axial = coupling[k]! * (V[p]! - V[k]!);
      D[k] = D[k]! + coupling[k]!;
      D[p] = D[p]! + coupling[k]!;
      R[k] = R[k]! + axial;
      R[p] = R[p]! - axial;
    }
    for (const pipette of pipettes) {
      const c = pipette.compartment;
      const way = wayOf(pipette);
      if (way === 'held') {
        D[c] = D[c]! + 1 / pipette.access;
        R[c] = R[c]! + (pipette.holding - V[c]!) / pipette.access;
      } else if (way !== 'imposed') R[c] = R[c]! + pipette.holding;
    }
    for (const { compartment } of imposed) {
      D[compartment] = 1;
      R[compartment] = 0;
    }
    eliminate(tree, D, R, inverse);
    // A pivot that is not positive: the pace outruns the membrane's own instability.
    if (!inverse.every((pivot) => pivot > 0)) {
      pace /= 4;
      if (pace < 1e-12) break;
      continue;
    }
    substitute(tree, R, inverse);
    let move = 0;
    for (let k = 0; k < count; k++) move = Math.max(move, Math.abs(R[k]!));
    if (!Number.isFinite(move)) break;
    const share = move > longestMove ? longestMove / move : 1;
    for (let k = 0; k < count; k++) V[k] = V[k]! + share * R[k]!;
    if (move < settled && pace > 1) return V;
    const rate = move / pace;
    // Nothing moves: there is no rate to go by, and none is needed.
    if (move < settled) pace *= 4;
    else if (share === 1) pace *= Math.min(4, Math.max(0.5, lastRate / rate));
    lastRate = rate;
  }
  return refuse('run-diverged', {
    thing: 'operating point',
    place: 'the holding levels',
    value: 'not found',
    remedy: "look at the cell's reversal potentials and rates, and at the holding levels",
  });
}
