import type { Grid } from '../cell/grid.ts';
import type { Metre, SquareMetre, Volt } from '../units/si.ts';

/**
 * Reach: the share of membrane area whose |clamp error| is within the tolerance, Σ area_k [|e_k| ≤ tol] / Σ area_k.
 * Spines and axon count.
 *
 * @param error V per compartment, grid order.
 * @returns 0 to 1.
 */
export function reachOf(grid: Pick<Grid, 'count' | 'area'>, error: Float64Array, tolerance: Volt): number {
  return shareOf(grid.area, error, tolerance);
}

/** The same by region; a compartment on a border counts in each by the area it has there. Regions without area are left out. */
export function reachByRegion(
  grid: Pick<Grid, 'regionNames' | 'regionArea'>,
  error: Float64Array,
  tolerance: Volt,
): { readonly region: string; readonly area: SquareMetre; readonly reach: number }[] {
  return grid.regionNames.flatMap((region, r) => {
    const area = grid.regionArea[r] ?? new Float64Array();
    const total = sum(area);
    return total === 0 ? [] : [{ region, area: total, reach: shareOf(area, error, tolerance) }];
  });
}

/**
 * Trust distance: along every path from the root to a tip, the first place where |clamp error| leaves the tolerance,
 * on the straight line between the two centres around it; the smallest of them.
 *
 * @returns path distance from the soma's surface (without a soma: from the root), m; null where no path leaves.
 */
export function trustDistance(
  grid: Pick<Grid, 'count' | 'parent' | 'distance'>,
  error: Float64Array,
  tolerance: Volt,
): Metre | null {
  // trusted[k]: everything from the root to compartment k is within the tolerance. Parents come first.
  const trusted = new Uint8Array(grid.count);
  let nearest = Infinity;
  for (let k = 0; k < grid.count; k += 1) {
    const p = grid.parent[k] ?? -1;
    if (p >= 0 && trusted[p] === 0) continue;
    const here = error[k] ?? NaN;
    const distance = grid.distance[k] ?? NaN;
    if (Math.abs(here) <= tolerance) {
      trusted[k] = 1;
    } else if (p < 0) {
      nearest = Math.min(nearest, distance);
    } else {
      const before = error[p] ?? NaN;
      const edge = here > 0 ? tolerance : -tolerance;
      const from = grid.distance[p] ?? NaN;
      nearest = Math.min(nearest, from + ((edge - before) / (here - before)) * (distance - from));
    }
  }
  return nearest === Infinity ? null : nearest;
}

function shareOf(area: Float64Array, error: Float64Array, tolerance: Volt): number {
  return sum(area.map((a, k) => (Math.abs(error[k] ?? NaN) <= tolerance ? a : 0))) / sum(area);
}

function sum(values: Float64Array): number {
  return values.reduce((total, value) => total + value, 0);
}
