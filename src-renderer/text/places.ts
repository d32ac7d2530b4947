// Places on the cell in words, and words back to places. Pure geometry over the drawing.
import type { PlanDocument, Site } from '../../src-main/contract/documents.ts';
import type { CellDrawing, DrawnBranch } from '../../src-main/contract/results.ts';
import { given } from './quantity.ts';

/** Length of a drawn branch, µm. */
export function branchLength(branch: DrawnBranch): number {
  return branch.at_um.at(-1) ?? 0;
}

/** Path distance of a site from the soma's surface, µm; null where the drawing has no such branch. */
export function siteDistance(drawing: CellDrawing, site: Site): number | null {
  if ('compartment' in site) {
    const k = drawing.compartments.names?.indexOf(site.compartment) ?? -1;
    return k < 0 ? null : (drawing.compartments.distance_um[k] ?? null);
  }
  const branch = drawing.branches.find((b) => b.branch === site.branch);
  return branch === undefined ? null : branch.startDistance_um + Math.min(site.at_um, branchLength(branch));
}

/** "soma", "apical 320 µm" (by path), or the compartment's own name. */
export function siteWords(drawing: CellDrawing | null, site: Site): string {
  if ('compartment' in site) return site.compartment;
  if (drawing === null) return site.branch === 0 ? 'soma' : `branch ${site.branch}`;
  const branch = drawing.branches.find((b) => b.branch === site.branch);
  if (branch === undefined) return `branch ${site.branch}, not on this cell`;
  if (branch.parent < 0 && drawing.soma !== null) return 'soma';
  const distance = branch.startDistance_um + Math.min(site.at_um, branchLength(branch));
  return `${branch.region} ${given(Math.round(distance), 'µm')}`;
}

/**
 * The place in a region at a path distance from the soma. Of several, the one on the thickest branch: where a pipette
 * would go. Without any so far out, the region's farthest.
 */
export function siteAt(drawing: CellDrawing, region: string, distance_um: number): Site | null {
  const branches = drawing.branches.filter((b) => b.region === region);
  let best: { readonly site: Site; readonly miss: number; readonly radius: number } | null = null;
  for (const branch of branches) {
    const length = branchLength(branch);
    const at_um = Math.min(length, Math.max(0, distance_um - branch.startDistance_um));
    const miss = Math.abs(branch.startDistance_um + at_um - distance_um);
    const radius = radiusAt(branch, at_um);
    if (best === null || miss < best.miss - 1e-6 || (miss < best.miss + 1e-6 && radius > best.radius)) {
      best = { site: { branch: branch.branch, at_um: round(at_um) }, miss, radius };
    }
  }
  return best?.site ?? null;
}

/** Radius of a branch at a place along it, µm; between drawn points in proportion. */
export function radiusAt(branch: DrawnBranch, at_um: number): number {
  const next = branch.at_um.findIndex((at) => at >= at_um);
  if (next <= 0) return branch.radius_um[next < 0 ? branch.radius_um.length - 1 : 0] ?? 0;
  const a0 = branch.at_um[next - 1] ?? 0;
  const a1 = branch.at_um[next] ?? 0;
  const share = a1 > a0 ? (at_um - a0) / (a1 - a0) : 0;
  const r0 = branch.radius_um[next - 1] ?? 0;
  return r0 + share * ((branch.radius_um[next] ?? r0) - r0);
}

/** The compartment a site lies in: the nearest centre on its branch; −1 where there is none. */
export function compartmentAt(drawing: CellDrawing, site: Site): number {
  const table = drawing.compartments;
  if ('compartment' in site) return table.names?.indexOf(site.compartment) ?? -1;
  let best = -1;
  let miss = Infinity;
  for (let k = 0; k < table.count; k++) {
    if (table.branch[k] !== site.branch) continue;
    const d = Math.abs((table.at_um[k] ?? 0) - site.at_um);
    if (d < miss) {
      miss = d;
      best = k;
    }
  }
  return best;
}

/**
 * A site moved along the cell by micrometres: outward when positive. Past a branch's start it goes on at the parent's
 * end; past its end in the child that leads to the branch `toward`, else in the thickest. Moving back by as much comes
 * back to the very place, unless the cell ended on the way.
 */
export function movedSite(drawing: CellDrawing, site: Site, by_um: number, toward: number | null = null): Site {
  if ('compartment' in site) return site;
  const branch = drawing.branches.find((b) => b.branch === site.branch);
  if (branch === undefined) return site;
  const length = branchLength(branch);
  const to = site.at_um + by_um;
  if (to < 0) {
    const parent = drawing.branches.find((b) => b.branch === branch.parent);
    if (parent === undefined) return { branch: branch.branch, at_um: 0 };
    return movedSite(drawing, { branch: parent.branch, at_um: branchLength(parent) }, to, toward);
  }
  if (to > length) {
    const child = childToward(drawing, branch, toward);
    if (child === null) return { branch: branch.branch, at_um: round(length) };
    return movedSite(drawing, { branch: child.branch, at_um: 0 }, to - length, toward);
  }
  // Sums such as 2.3 − 1 carry binary noise: a tenth of a nanometre takes it off.
  return { branch: branch.branch, at_um: Math.min(length, Number(to.toFixed(4))) };
}

function childToward(drawing: CellDrawing, branch: DrawnBranch, toward: number | null): DrawnBranch | null {
  const children = drawing.branches.filter((b) => b.parent === branch.branch);
  const leading = children.find((b) => toward !== null && isWithin(drawing, toward, b.branch));
  return (
    leading ??
    children.reduce<DrawnBranch | null>(
      (best, b) => (best === null || (b.radius_um[0] ?? 0) > (best.radius_um[0] ?? 0) ? b : best),
      null,
    )
  );
}

/** Whether a branch is another or grows from it, at whatever remove. */
export function isWithin(drawing: CellDrawing, branch: number, of: number): boolean {
  for (let at = branch; at >= 0; at = drawing.branches.find((b) => b.branch === at)?.parent ?? -1) {
    if (at === of) return true;
  }
  return false;
}

/** A probe name no other probe has: the place, with a number when the place is taken. */
export function probeName(plan: PlanDocument, drawing: CellDrawing, site: Site): string {
  const place = siteWords(drawing, site).replaceAll('\u2009', ' ');
  const taken = new Set(plan.probes.map((p) => p.name));
  if (!taken.has(place)) return place;
  let n = 2;
  while (taken.has(`${place} (${n})`)) n++;
  return `${place} (${n})`;
}

/** Tenths of a micrometre: finer than any tracing. */
function round(um: number): number {
  return Math.floor(um * 10) / 10;
}
