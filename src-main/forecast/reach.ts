import type { Grid, StretchArea } from '../cell/grid.ts';
import type { Metre, SquareMetre, Volt } from '../units/si.ts';

type Membrane = Pick<Grid, 'count' | 'parent' | 'area' | 'regionNames' | 'regionArea' | 'regionStretch'>;

/**
 * Reach: the share of membrane area whose |clamp error| is within the tolerance. Spines and axon count.
 *
 * Between two centres the error is taken as a straight line and the membrane as spread evenly over each half of the way,
 * so that a compartment at the edge counts by the part of it that is inside; what lies at a centre, and the compartments
 * of a sketch, count whole or not at all. Second order in the length of compartments.
 *
 * @param error V per compartment, grid order.
 * @returns 0 to 1.
 */
export function reachOf(grid: Membrane, error: Float64Array, tolerance: Volt): number {
  const edges = (grid.regionStretch ?? []).map((stretch) => atEdges(grid.parent, stretch, error, tolerance));
  return shareOf(
    grid.area,
    error,
    tolerance,
    edges.reduce((total, area) => total + area, 0),
  );
}

/** The same by region; a compartment on a border counts in each by the area it has there. Regions without area are left out. */
export function reachByRegion(
  grid: Membrane,
  error: Float64Array,
  tolerance: Volt,
): { readonly region: string; readonly area: SquareMetre; readonly reach: number }[] {
  return grid.regionNames.flatMap((region, r) => {
    const area = grid.regionArea[r] ?? new Float64Array();
    const total = sum(area);
    if (total === 0) return [];
    const stretch = grid.regionStretch?.[r];
    const edges = stretch === undefined ? 0 : atEdges(grid.parent, stretch, error, tolerance);
    return [{ region, area: total, reach: shareOf(area, error, tolerance, edges) }];
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

/** The share of whole compartments within the tolerance, `edges` more or less: what compartments at the edge have inside. */
function shareOf(area: Float64Array, error: Float64Array, tolerance: Volt, edges: SquareMetre): number {
  const inside = sum(area.map((a, k) => (isWithin(error[k], tolerance) ? a : 0)));
  return Math.min(1, Math.max(0, (inside + edges) / sum(area)));
}

/**
 * What to add to the area of the compartments whose centres are within the tolerance, m²: for every stretch on which the
 * error crosses it, what is inside of the compartment that is out, less what is outside of the one that is in.
 */
function atEdges(parent: Int32Array, stretch: StretchArea, error: Float64Array, tolerance: Volt): SquareMetre {
  let area = 0;
  for (let k = 1; k < parent.length; k += 1) {
    const p = parent[k] ?? -1;
    const own = error[k] ?? NaN;
    const parents = error[p] ?? NaN;
    if (isWithin(own, tolerance) && isWithin(parents, tolerance)) continue;
    const middle = (own + parents) / 2;
    area += (stretch.own[k] ?? NaN) * (partWithin(own, middle, tolerance) - Number(isWithin(own, tolerance)));
    area +=
      (stretch.parents[k] ?? NaN) * (partWithin(parents, middle, tolerance) - Number(isWithin(parents, tolerance)));
  }
  return area;
}

/** The share of a straight way from error a to error b that is within the tolerance. */
function partWithin(a: Volt, b: Volt, tolerance: Volt): number {
  if (a === b) return Number(isWithin(a, tolerance));
  const low = (-tolerance - a) / (b - a);
  const high = (tolerance - a) / (b - a);
  return Math.max(0, Math.min(1, Math.max(low, high)) - Math.max(0, Math.min(low, high)));
}

function isWithin(error: Volt | undefined, tolerance: Volt): boolean {
  return Math.abs(error ?? NaN) <= tolerance;
}

function sum(values: Float64Array): number {
  return values.reduce((total, value) => total + value, 0);
}
