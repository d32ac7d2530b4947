// The cell at DC, linearised at its operating point: resistances, attenuation and how far a clamp reaches.
import type { Grid } from '../cell/grid.ts';
import type { Kinetics } from '../channels/kinetics.ts';
import type { Ohm, Siemens } from '../units/si.ts';
import { steadyMembrane } from './steady-membrane.ts';

/**
 * A linearised tree with both sides of every coupling summed up, so that any resistance is one walk away.
 * All arrays: one entry per compartment, grid order.
 */
export interface SteadyTree {
  readonly grid: Grid;
  /** Conductance seen at each compartment, the whole tree included, S: 1/input resistance. */
  readonly whole: Float64Array;
  /** V(child)/V(parent) when the source is not in the child's branch. */
  readonly outward: Float64Array;
  /** V(parent)/V(child) when the source is in the child's branch. */
  readonly homeward: Float64Array;
}

/**
 * Slope conductance of the membrane per compartment, S: dI/dV of all channels with the gates following to their steady
 * states. It may be negative where a steady inward current grows with voltage.
 */
export function slopeConductance(
  grid: Grid,
  kinetics: ReadonlyMap<string, Kinetics>,
  temperature: number,
  V: Float64Array,
): Float64Array {
  return steadyMembrane(grid, kinetics, temperature, V).slope;
}

/**
 * The tree at DC with membrane conductances `slope` (S, per compartment); `shunts` are further conductances to ground,
 * such as 1/Rs of another voltage clamp ([compartment, S]).
 *
 * Up:   Y_k = y_k + Σ_children G·(1 − f),  f = G/(G + Y_child).   Down: the parent's conductance without the child's
 * branch, A, gives h = G/(G + A) and the whole seen at the child, Y_child + A·G/(G + A). Two passes, O(N).
 *
 * @source Rall W (1959), Exp Neurol 1:491–527; Koch C (1999), Biophysics of Computation, ch. 3. Both from memory.
 */
export function steadyTree(
  grid: Grid,
  slope: Float64Array,
  shunts: readonly (readonly [number, Siemens])[] = [],
): SteadyTree {
  const { count, parent, coupling } = grid;
  const branch = Float64Array.from(slope);
  for (const [compartment, shunt] of shunts) branch[compartment] = branch[compartment]! + shunt;
  const local = Float64Array.from(branch);
  const outward = new Float64Array(count);
  for (let k = count - 1; k > 0; k--) {
    const G = coupling[k]!;
    outward[k] = G / (G + branch[k]!);
    // G·(1 − f) without the subtraction.
    branch[parent[k]!] = branch[parent[k]!]! + (G * branch[k]!) / (G + branch[k]!);
  }
  const homeward = new Float64Array(count);
  const whole = Float64Array.from(branch);
  const children = childrenOf(grid);
  // What arrives at each compartment from its parent's side, S.
  const fromParent = new Float64Array(count);
  for (let p = 0; p < count; p++) {
    const own = children[p]!;
    const parts = own.map((k) => (coupling[k]! * branch[k]!) / (coupling[k]! + branch[k]!));
    // Sums of all but one, from both ends: subtracting would lose digits where one branch carries nearly all.
    const before = runningSums(parts);
    const after = runningSums([...parts].reverse()).reverse();
    own.forEach((k, i) => {
      const G = coupling[k]!;
      const without = local[p]! + fromParent[p]! + before[i]! + after[i]!;
      homeward[k] = G / (G + without);
      fromParent[k] = (G * without) / (G + without);
      whole[k] = branch[k]! + fromParent[k];
    });
  }
  return { grid, whole, outward, homeward };
}

function childrenOf(grid: Grid): number[][] {
  const children = Array.from({ length: grid.count }, (): number[] => []);
  for (let k = 1; k < grid.count; k++) children[grid.parent[k]!]!.push(k);
  return children;
}

/** Sum of the parts before each. */
function runningSums(parts: readonly number[]): number[] {
  let sum = 0;
  return parts.map((part) => {
    const before = sum;
    sum += part;
    return before;
  });
}

/** Voltage at `compartment` per ampere put in there. Negative where the membrane is unstable on its own. */
export function inputResistance(tree: SteadyTree, compartment: number): Ohm {
  return 1 / tree.whole[compartment]!;
}

/**
 * V(x)/V(site) at DC for every x, the source at `site` and nowhere else: what a voltage clamp at `site` controls of the
 * rest, whatever its access resistance. O(N).
 *
 * @returns one entry per compartment; 1 at the site.
 */
export function controlFrom(tree: SteadyTree, site: number): Float64Array {
  const { grid, outward, homeward } = tree;
  const control = new Float64Array(grid.count);
  const known = new Uint8Array(grid.count);
  control[site] = 1;
  known[site] = 1;
  for (let k = site; k > 0;) {
    const p = grid.parent[k]!;
    control[p] = control[k]! * homeward[k]!;
    known[p] = 1;
    k = p;
  }
  for (let k = 1; k < grid.count; k++) {
    if (known[k] === 0) control[k] = control[grid.parent[k]!]! * outward[k]!;
  }
  return control;
}

/** V at the site per V of command at DC: R/(R + Rs), R the cell's input resistance there. 1 for an ideal clamp. */
export function accessShare(tree: SteadyTree, site: number, access: Ohm): number {
  return 1 / (1 + access * tree.whole[site]!);
}

/** Voltage at `to` per ampere put in at `from`; the same both ways. */
export function transferResistance(tree: SteadyTree, from: number, to: number): Ohm {
  return inputResistance(tree, from) * controlFrom(tree, from)[to]!;
}

/**
 * |V(here)/V(there)| at DC with the source at `here` and no voltage clamp active: 1 or more in a passive cell.
 *
 * @source Rall W, Rinzel J (1973), Biophys J 13:648–688 (from memory).
 */
export function attenuation(tree: SteadyTree, here: number, there: number): number {
  return Math.abs(1 / controlFrom(tree, here)[there]!);
}
