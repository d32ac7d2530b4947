// The membrane of a sweep: gated channels with their states, and what they put into the rows of the system.
import type { Grid } from '../cell/grid.ts';
import { isInstant, type Gate, type Kinetics } from '../channels/kinetics.ts';
import type { Ampere, Second, Volt } from '../units/si.ts';
import { advancedGate, chooseRows, gateRows, type GateRows } from './gate-rows.ts';
import type { SweepState } from './run.ts';

/** One channel over the compartments that have it. Entry i of G, E and the states belongs to compartment at[i]. */
export interface GatedChannel {
  readonly name: string;
  readonly gates: readonly Gate[];
  /** Per gate: whether it follows the voltage at once. */
  readonly instant: readonly boolean[];
  readonly at: Int32Array;
  readonly G: Float64Array;
  readonly E: Float64Array;
  /** Per gate; of an instant one its value at the beginning of the last step. */
  readonly states: readonly Float64Array[];
  /** Number of its first gate among all gates of the cell. */
  readonly firstGate: number;
}

export interface Membrane {
  readonly channels: readonly GatedChannel[];
  readonly rows: GateRows;
  /** Scratch: each compartment's row of the table, and the part of the way to the next. */
  readonly row: Int32Array;
  readonly part: Float64Array;
}

/** Channels with gates, in the order of the grid's conductances: the order of `SweepState.gates`. */
export function gatedChannels(
  grid: Grid,
  kinetics: ReadonlyMap<string, Kinetics>,
): { name: string; kinetics: Kinetics; conductance: Float64Array; reversal: Float64Array }[] {
  return grid.conductances.flatMap(({ channel, conductance, reversal }) => {
    const known = kinetics.get(channel);
    return known === undefined || known.gates.length === 0
      ? []
      : [{ name: channel, kinetics: known, conductance, reversal }];
  });
}

/** The membrane at its start: gates as carried over, else steady at the start's voltages. */
export function membraneOf(input: {
  readonly grid: Grid;
  readonly kinetics: ReadonlyMap<string, Kinetics>;
  readonly temperature: number;
  readonly start: SweepState;
  readonly advances: readonly Second[];
  readonly spacing: Volt;
}): Membrane {
  const { grid, start } = input;
  const gates: Gate[] = [];
  const channels = gatedChannels(grid, input.kinetics).map((channel, c) => {
    const present = [...channel.conductance.keys()].filter((k) => channel.conductance[k]! > 0);
    const at = Int32Array.from(present);
    const carried = start.gates?.[c];
    const states = channel.kinetics.gates.map((gate, g) => {
      const from = carried?.[g];
      return Float64Array.from(at, (k) => (from === undefined ? gate.inf(1e3 * start.V[k]!) : from[k]!));
    });
    const firstGate = gates.length;
    gates.push(...channel.kinetics.gates);
    return {
      name: channel.name,
      gates: channel.kinetics.gates,
      instant: channel.kinetics.gates.map(isInstant),
      at,
      G: Float64Array.from(at, (k) => channel.conductance[k]!),
      E: Float64Array.from(at, (k) => channel.reversal[k]!),
      states,
      firstGate,
    };
  });
  const rows = gateRows(gates, {
    temperature: input.temperature,
    advances: gates.length === 0 ? [] : input.advances,
    compartments: grid.count,
    spacing: input.spacing,
  });
  return { channels, rows, row: new Int32Array(grid.count), part: new Float64Array(grid.count) };
}

/**
 * Takes all gates forward by `advance` at the voltages V, and adds the open channels to the rows: D += g, R += g·E.
 *
 * @param lead how far the middle of the step lies beyond V, in lengths of the step before; 0 after a break. An instant
 *        gate goes there along the line through its last two values: at V alone it would be half a step late.
 */
export function advanceGates(
  membrane: Membrane,
  advance: Second,
  V: Float64Array,
  D: Float64Array,
  R: Float64Array,
  lead: number,
): void {
  if (membrane.channels.length === 0) return;
  const { rows, row, part } = membrane;
  chooseRows(rows, advance, V, row, part);
  for (let c = 0; c < membrane.channels.length; c++) {
    const channel = membrane.channels[c]!;
    const column = 4 * channel.firstGate;
    if (channel.instant.includes(true)) advanceMany(channel, column, rows.values, row, part, D, R, lead);
    else if (channel.gates.length === 1) advanceOne(channel, column, rows.values, row, part, D, R);
    else if (channel.gates.length === 2) advanceTwo(channel, column, rows.values, row, part, D, R);
    else advanceMany(channel, column, rows.values, row, part, D, R, lead);
  }
}

function advanceOne(
  channel: GatedChannel,
  column: number,
  T: Float64Array,
  row: Int32Array,
  part: Float64Array,
  D: Float64Array,
  R: Float64Array,
): void {
  const { at, G, E } = channel;
  const X = channel.states[0]!;
  const power = channel.gates[0]!.power;
  for (let i = 0; i < at.length; i++) {
    const k = at[i]!;
    const t = row[k]! + column;
    const f = part[k]!;
    const x = X[i]! * (T[t]! + f * T[t + 1]!) + (T[t + 2]! + f * T[t + 3]!);
    X[i] = x;
    const g = G[i]! * raised(x, power);
    D[k] = D[k]! + g;
    R[k] = R[k]! + g * E[i]!;
  }
}

function advanceTwo(
  channel: GatedChannel,
  column: number,
  T: Float64Array,
  row: Int32Array,
  part: Float64Array,
  D: Float64Array,
  R: Float64Array,
): void {
  const { at, G, E } = channel;
  const X = channel.states[0]!;
  const Y = channel.states[1]!;
  const powerX = channel.gates[0]!.power;
  const powerY = channel.gates[1]!.power;
  for (let i = 0; i < at.length; i++) {
    const k = at[i]!;
    const t = row[k]! + column;
    const f = part[k]!;
    const x = X[i]! * (T[t]! + f * T[t + 1]!) + (T[t + 2]! + f * T[t + 3]!);
    const y = Y[i]! * (T[t + 4]! + f * T[t + 5]!) + (T[t + 6]! + f * T[t + 7]!);
    X[i] = x;
    Y[i] = y;
    const g = G[i]! * raised(x, powerX) * raised(y, powerY);
    D[k] = D[k]! + g;
    R[k] = R[k]! + g * E[i]!;
  }
}

function advanceMany(
  channel: GatedChannel,
  column: number,
  T: Float64Array,
  row: Int32Array,
  part: Float64Array,
  D: Float64Array,
  R: Float64Array,
  lead: number,
): void {
  const { at, G, E, gates, instant, states } = channel;
  for (let i = 0; i < at.length; i++) {
    const k = at[i]!;
    const f = part[k]!;
    let g = G[i]!;
    for (let s = 0; s < gates.length; s++) {
      const t = row[k]! + column + 4 * s;
      const X = states[s]!;
      const before = X[i]!;
      const x = before * (T[t]! + f * T[t + 1]!) + (T[t + 2]! + f * T[t + 3]!);
      X[i] = x;
      const middle = instant[s]! ? Math.min(1, Math.max(0, x + lead * (x - before))) : x;
      g *= raised(middle, gates[s]!.power);
    }
    D[k] = D[k]! + g;
    R[k] = R[k]! + g * E[i]!;
  }
}

/** x to a whole power, 1…8, by products: the same bits on every machine. */
export function raised(x: number, power: number): number {
  if (power === 1) return x;
  const square = x * x;
  if (power === 2) return square;
  if (power === 3) return square * x;
  if (power === 4) return square * square;
  let product = square * square;
  for (let i = 4; i < power; i++) product *= x;
  return product;
}

/** Current of one channel in one of its compartments (index i), gates taken `ahead` at V; outward positive. */
export function channelCurrent(membrane: Membrane, channel: GatedChannel, i: number, V: Volt, ahead: Second): Ampere {
  let g = channel.G[i]!;
  for (let s = 0; s < channel.gates.length; s++) {
    const gate = channel.gates[s]!;
    const x = channel.instant[s]! ? gate.inf(1e3 * V) : channel.states[s]![i]!;
    const factor = membrane.rows.factors[channel.firstGate + s]!;
    g *= raised(ahead === 0 || channel.instant[s]! ? x : advancedGate(gate, factor, x, V, ahead), gate.power);
  }
  return g * (V - channel.E[i]!);
}

/** States per channel, gate and compartment, grid order; 0 where the channel is absent. */
export function gateStates(membrane: Membrane, count: number): Float64Array[][] {
  return membrane.channels.map(({ states, at }) =>
    states.map((state) => {
      const all = new Float64Array(count);
      at.forEach((k, i) => (all[k] = state[i]!));
      return all;
    }),
  );
}
