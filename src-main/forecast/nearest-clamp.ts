import type { Grid } from '../cell/grid.ts';

/**
 * For every compartment the clamp that is nearest along the tree: an index into `sites`. Path distance counts; in a
 * sketch, which has none, the number of couplings. Of equally near ones the first. Two passes, O(N).
 *
 * @param sites compartments, at least one.
 */
export function nearestClamp(grid: Pick<Grid, 'count' | 'parent' | 'distance'>, sites: readonly number[]): Int32Array {
  const nearest = new Int32Array(grid.count);
  const distance = new Float64Array(grid.count).fill(Infinity);
  sites.forEach((compartment, clamp) => {
    if (distance[compartment] === 0) return;
    distance[compartment] = 0;
    nearest[compartment] = clamp;
  });
  const isSketch = grid.distance.every((d) => d === 0);
  const along = (k: number, p: number): number => (isSketch ? 1 : Math.abs(grid.distance[k]! - grid.distance[p]!));
  const offer = (to: number, from: number, way: number): void => {
    const far = distance[from]! + way;
    if (far > distance[to]! || (far === distance[to]! && nearest[to]! <= nearest[from]!)) return;
    distance[to] = far;
    nearest[to] = nearest[from]!;
  };
  // Children before parents, then parents before children: every compartment hears of every site.
  for (let k = grid.count - 1; k > 0; k--) offer(grid.parent[k]!, k, along(k, grid.parent[k]!));
  for (let k = 1; k < grid.count; k++) offer(k, grid.parent[k]!, along(k, grid.parent[k]!));
  return nearest;
}
