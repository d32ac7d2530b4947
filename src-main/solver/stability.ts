import type { Grid } from '../cell/grid.ts';
import { wayOf } from './electrodes.ts';
import type { HeldPipette } from './operating-point.ts';
import type { SteadyMembrane } from './steady-membrane.ts';
import { treeOf, type Tree } from './tree.ts';

/** A pivot may turn by this much, radians, from one frequency to the next; else the interval is cut. */
const largestTurn = 0.8;
const deepestCut = 24;
const perDecade = 8;

/**
 * Whether small deviations from a steady state die out, gates and pipettes included.
 *
 * The linearised system has a growing mode for every zero of det Y(λ) with positive real part, Y the tree's admittance
 * matrix. Along the imaginary axis the determinant is followed as the product of the elimination's pivots; each turn of
 * a pivot across the negative real axis counts. Exact but for the frequencies it looks at, which close in where a pivot
 * turns fast. Work is proportional to the number of compartments.
 *
 * @source The argument principle as in Nyquist H (1932), Bell Syst Tech J 11:126–147 (from memory).
 */
export function isStable(grid: Grid, membrane: SteadyMembrane, pipettes: readonly HeldPipette[]): boolean {
  if (membrane.delayed.length === 0) return true;
  const system = systemOf(grid, membrane, pipettes);
  const { count } = grid;
  let fastest = 1;
  for (let k = 0; k < count; k++) fastest = Math.max(fastest, system.fixed[k]! / grid.capacitance[k]!);
  let slowest = 1e3;
  for (const { tau } of membrane.delayed) for (const t of tau) if (t > 0) slowest = Math.min(slowest, 1 / t);

  const first = 1e-3 * slowest;
  const decades = Math.log10((1e3 * fastest) / first);
  const points = Math.ceil(decades * perDecade);
  let angles = anglesAt(system, 0);
  // A pivot that is negative at rest starts on the axis it is to cross: half a turn.
  let growing = 0;
  for (const angle of angles) if (angle !== 0) growing++;
  let omega = 0;
  for (let i = 0; i <= points; i++) {
    const to = first * 10 ** ((decades * i) / points);
    const later = anglesAt(system, to);
    growing -= 2 * windings(system, omega, angles, to, later, deepestCut);
    omega = to;
    angles = later;
  }
  return growing === 0;
}

interface System {
  readonly tree: Tree;
  readonly grid: Grid;
  readonly membrane: SteadyMembrane;
  /** Couplings, chord conductances and clamps through resistance. */
  readonly fixed: Float64Array;
  readonly pipettes: readonly HeldPipette[];
  readonly imposed: readonly number[];
}

function systemOf(grid: Grid, membrane: SteadyMembrane, pipettes: readonly HeldPipette[]): System {
  const fixed = Float64Array.from(membrane.chord);
  for (let k = 1; k < grid.count; k++) {
    const p = grid.parent[k]!;
    fixed[k] = fixed[k]! + grid.coupling[k]!;
    fixed[p] = fixed[p]! + grid.coupling[k]!;
  }
  for (const pipette of pipettes) {
    if (wayOf(pipette) === 'held') fixed[pipette.compartment] = fixed[pipette.compartment]! + 1 / pipette.access;
  }
  const imposed = pipettes.filter((pipette) => wayOf(pipette) === 'imposed').map(({ compartment }) => compartment);
  return { tree: treeOf(grid, imposed), grid, membrane, fixed, pipettes, imposed };
}

/** Arguments of all pivots at angular frequency omega, −π…π; 0 at an imposed compartment. */
function anglesAt(system: System, omega: number): Float64Array {
  const { tree, grid, membrane, fixed, pipettes, imposed } = system;
  const { count } = grid;
  const re = Float64Array.from(fixed);
  const im = Float64Array.from(grid.capacitance, (C) => omega * C);
  for (const { conductance, tau } of membrane.delayed) {
    for (let k = 0; k < count; k++) {
      const turn = omega * tau[k]!;
      const part = conductance[k]! / (1 + turn * turn);
      re[k] = re[k]! + part;
      im[k] = im[k]! - part * turn;
    }
  }
  for (const pipette of pipettes) {
    const c = pipette.compartment;
    const way = wayOf(pipette);
    if (way === 'injecting' && pipette.access === 0) im[c] = im[c]! + omega * pipette.stray;
    if (way === 'behind a node') {
      // iωC in series with 1/Rs.
      const turn = omega * pipette.stray * pipette.access;
      const part = turn / (pipette.access * (1 + turn * turn));
      re[c] = re[c]! + part * turn;
      im[c] = im[c]! + part;
    }
  }
  for (const c of imposed) {
    re[c] = 1;
    im[c] = 0;
  }
  const angles = new Float64Array(count);
  for (let k = count - 1; k >= 0; k--) {
    if (imposed.includes(k)) {
      re[k] = 1;
      im[k] = 0;
    }
    const x = re[k]!;
    const y = im[k]!;
    angles[k] = Math.atan2(y, x);
    if (k === 0) break;
    const p = tree.parent[k]!;
    const share = (tree.up[k]! * tree.down[k]!) / (x * x + y * y);
    re[p] = re[p]! - share * x;
    im[p] = im[p]! + share * y;
  }
  return angles;
}

/** Crossings of the negative real axis by any pivot between two frequencies; upward (counter-clockwise) ones positive. */
function windings(
  system: System,
  from: number,
  before: Float64Array,
  to: number,
  after: Float64Array,
  depth: number,
): number {
  let crossings = 0;
  let fast = false;
  for (let k = 0; k < before.length; k++) {
    const turn = after[k]! - before[k]!;
    const shortest = turn > Math.PI ? turn - 2 * Math.PI : turn < -Math.PI ? turn + 2 * Math.PI : turn;
    if (Math.abs(shortest) > largestTurn) fast = true;
    if (turn > Math.PI) crossings--;
    else if (turn < -Math.PI) crossings++;
  }
  if (!fast || depth === 0) return crossings;
  const middle = from === 0 ? to / 2 : Math.sqrt(from * to);
  const between = anglesAt(system, middle);
  return (
    windings(system, from, before, middle, between, depth - 1) + windings(system, middle, between, to, after, depth - 1)
  );
}
