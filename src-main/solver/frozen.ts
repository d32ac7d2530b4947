// The cell at DC with its gates frozen: the linear cell that a quick estimate is made on.
import type { Grid } from '../cell/grid.ts';
import type { Siemens, Volt } from '../units/si.ts';
import type { SteadyMembrane } from './steady-membrane.ts';
import { solveTree, treeOf } from './tree.ts';

/** A voltage clamp at a level. */
export interface LevelledClamp {
  readonly compartment: number;
  /** 1/Rs, S; Infinity is ideal. */
  readonly conductance: Siemens;
  readonly level: Volt;
}

/**
 * Steady voltages under voltage clamps with every gate kept where it is at `frozenAt`:
 *
 *     Σ_j G_kj (V_j − V_k) + g_k (level − V_k) = I_k(frozenAt) + chord_k (V_k − frozenAt)
 *
 * One elimination, O(N).
 *
 * @param frozenAt V, the same everywhere.
 * @param membrane of the grid at `frozenAt`.
 * @returns V per compartment, grid order.
 */
export function frozenVoltages(
  grid: Grid,
  membrane: Pick<SteadyMembrane, 'current' | 'chord'>,
  frozenAt: Volt,
  clamps: readonly LevelledClamp[],
): Float64Array {
  const ideal = clamps.filter(({ conductance }) => conductance === Infinity);
  const tree = treeOf(
    grid,
    ideal.map(({ compartment }) => compartment),
  );
  const D = Float64Array.from(membrane.chord);
  // Row k: deviation of compartment k from frozenAt.
  const R = membrane.current.map((I) => -I);
  for (let k = 1; k < grid.count; k++) {
    const p = grid.parent[k]!;
    D[k] = D[k]! + grid.coupling[k]!;
    D[p] = D[p]! + grid.coupling[k]!;
  }
  for (const { compartment: c, conductance, level } of clamps) {
    if (conductance === Infinity) continue;
    D[c] = D[c]! + conductance;
    R[c] = R[c]! + conductance * (level - frozenAt);
  }
  for (const { compartment: c, level } of ideal) {
    D[c] = 1;
    R[c] = level - frozenAt;
  }
  solveTree(tree, D, R, new Float64Array(grid.count));
  return R.map((deviation) => frozenAt + deviation);
}
