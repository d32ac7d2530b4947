// The linear system of a tree of compartments, solved in one pass up and one pass down.
import type { Grid } from '../cell/grid.ts';

/**
 * Row k:  D[k]·x[k] − down[k]·x[parent] − Σ up[child]·x[child] = R[k].
 *
 * `up[k]` is how row parent[k] sees compartment k, `down[k]` how row k sees its parent. Both are the axial coupling,
 * except at a compartment whose voltage is imposed: its own row must see nobody.
 */
export interface Tree {
  readonly count: number;
  readonly parent: Int32Array;
  readonly up: Float64Array;
  readonly down: Float64Array;
}

/** The grid's tree; the rows of `imposed` compartments see no neighbour. */
export function treeOf(grid: Grid, imposed: readonly number[] = []): Tree {
  const { count, parent, coupling } = grid;
  const up = Float64Array.from(coupling);
  const down = Float64Array.from(coupling);
  for (const c of imposed) {
    down[c] = 0;
    for (let k = 1; k < count; k++) if (parent[k] === c) up[k] = 0;
  }
  return { count, parent, up, down };
}

/**
 * Eliminates children first. Leaves the reciprocal pivots in `inverse` and the reduced right side in R; D is spent.
 * Nothing is pivoted: with positive conductances every row dominates its own diagonal.
 *
 * @source Hines M (1984), Int J Biomed Comput 15:69–76 (from memory): numbering parents before children leaves no
 *         fill-in.
 */
export function eliminate(tree: Tree, D: Float64Array, R: Float64Array, inverse: Float64Array): void {
  const { count, parent, up, down } = tree;
  // The row in hand stays in d and r: along an unbranched run nothing is stored and loaded again.
  let d = D[count - 1]!;
  let r = R[count - 1]!;
  for (let k = count - 1; k > 0; k--) {
    const one = 1 / d;
    inverse[k] = one;
    const share = up[k]! * one;
    const p = parent[k]!;
    const next = k - 1;
    if (p === next) {
      d = D[next]! - share * down[k]!;
      r = R[next]! + share * r;
      R[next] = r;
    } else {
      D[p] = D[p]! - share * down[k]!;
      R[p] = R[p]! + share * r;
      d = D[next]!;
      r = R[next]!;
    }
  }
  inverse[0] = 1 / d;
}

/** Reduces another right side with the pivots of the last elimination. */
export function reduce(tree: Tree, R: Float64Array, inverse: Float64Array): void {
  const { count, parent, up } = tree;
  for (let k = count - 1; k > 0; k--) {
    const p = parent[k]!;
    R[p] = R[p]! + up[k]! * inverse[k]! * R[k]!;
  }
}

/** Parents first: turns the reduced right side into the solution, in place. */
export function substitute(tree: Tree, R: Float64Array, inverse: Float64Array): void {
  const { count, parent, down } = tree;
  R[0] = R[0]! * inverse[0]!;
  for (let k = 1; k < count; k++) R[k] = (R[k]! + down[k]! * R[parent[k]!]!) * inverse[k]!;
}

/** Solves for x in place of R. D is spent. */
export function solveTree(tree: Tree, D: Float64Array, R: Float64Array, inverse: Float64Array): void {
  eliminate(tree, D, R, inverse);
  substitute(tree, R, inverse);
}
