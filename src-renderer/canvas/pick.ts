// What lies under the pointer. Pure: the projected cell and a point in, a place on the cell out.
import type { Site } from '../../src-main/contract/documents.ts';
import type { CompartmentTable } from '../../src-main/contract/results.ts';
import type { Projected } from './projected.ts';

export interface Picked {
  readonly site: Site;
  readonly compartment: number;
  /** From the pointer, px. 0 inside the soma. */
  readonly distance_px: number;
  /** The picked point itself, px. */
  readonly x: number;
  readonly y: number;
}

/**
 * The place of the cell nearest to a point of the picture; the soma where the point lies on it.
 *
 * @param within_px farther places do not count.
 */
export function pick(cell: Projected, x: number, y: number, within_px: number, table: CompartmentTable): Picked | null {
  const { soma, model } = cell;
  if (soma !== null && model.soma !== null && Math.hypot(x - soma.x, y - soma.y) <= soma.radius) {
    const site = { branch: model.soma.branch, at_um: tenths(model.soma.length_um / 2) };
    const { compartment } = model.soma;
    return { site: named(site, compartment, table), compartment, distance_px: 0, x: soma.x, y: soma.y };
  }
  const near = nearestPiece(cell, x, y);
  if (near === null || near.distance_px > within_px) return null;
  const i = near.piece;
  const from = model.from_um[i] ?? 0;
  const at_um = tenths(from + near.share * ((model.to_um[i] ?? from) - from));
  const compartment = model.compartment[i] ?? -1;
  const site = named({ branch: model.branch[i] ?? 0, at_um }, compartment, table);
  return { site, compartment, distance_px: near.distance_px, x: near.x, y: near.y };
}

interface NearPiece {
  readonly piece: number;
  /** 0 at the piece's start, 1 at its end. */
  readonly share: number;
  readonly distance_px: number;
  readonly x: number;
  readonly y: number;
}

function nearestPiece(cell: Projected, x: number, y: number): NearPiece | null {
  const { xy, width, model } = cell;
  let best = -1;
  let bestShare = 0;
  let bestMiss = Infinity;
  for (let i = 0; i < model.count; i++) {
    const x0 = xy[4 * i] ?? 0;
    const y0 = xy[4 * i + 1] ?? 0;
    const dx = (xy[4 * i + 2] ?? 0) - x0;
    const dy = (xy[4 * i + 3] ?? 0) - y0;
    const square = dx * dx + dy * dy;
    const share = square > 0 ? Math.max(0, Math.min(1, ((x - x0) * dx + (y - y0) * dy) / square)) : 0;
    // Thick branches reach out to the pointer by their half width.
    const miss = Math.hypot(x - x0 - share * dx, y - y0 - share * dy) - (width[i] ?? 0) / 2;
    if (miss < bestMiss) {
      bestMiss = miss;
      best = i;
      bestShare = share;
    }
  }
  if (best < 0) return null;
  const x0 = xy[4 * best] ?? 0;
  const y0 = xy[4 * best + 1] ?? 0;
  return {
    piece: best,
    share: bestShare,
    distance_px: Math.max(0, bestMiss),
    x: x0 + bestShare * ((xy[4 * best + 2] ?? x0) - x0),
    y: y0 + bestShare * ((xy[4 * best + 3] ?? y0) - y0),
  };
}

/** A sketched cell has names instead of branches. */
function named(site: Site, compartment: number, table: CompartmentTable): Site {
  const name = table.names?.[compartment];
  return name === undefined ? site : { compartment: name };
}

/** Rounded down, so that a place at a branch's very end stays on it. */
function tenths(um: number): number {
  return Math.floor(um * 10 + 1e-6) / 10;
}

/** Where a site stands on the picture, px; null where the cell has no such place. */
export function placeOf(
  cell: Projected,
  site: Site,
  table: CompartmentTable,
): { readonly x: number; readonly y: number } | null {
  const { model, xy, soma } = cell;
  const compartment = 'compartment' in site ? (table.names?.indexOf(site.compartment) ?? -1) : null;
  if (model.soma !== null && soma !== null) {
    if (compartment === model.soma.compartment || ('branch' in site && site.branch === model.soma.branch)) return soma;
  }
  let end: { x: number; y: number } | null = null;
  for (let i = 0; i < model.count; i++) {
    const isHere = 'branch' in site ? model.branch[i] === site.branch : model.compartment[i] === compartment;
    if (!isHere) continue;
    const from = model.from_um[i] ?? 0;
    const to = model.to_um[i] ?? 0;
    const at = 'branch' in site ? site.at_um : (from + to) / 2;
    const share = to > from ? Math.max(0, Math.min(1, (at - from) / (to - from))) : 1;
    const x0 = xy[4 * i] ?? 0;
    const y0 = xy[4 * i + 1] ?? 0;
    end = { x: x0 + share * ((xy[4 * i + 2] ?? x0) - x0), y: y0 + share * ((xy[4 * i + 3] ?? y0) - y0) };
    // Upright connectors of the flat layout have no length along the branch.
    if (at <= to && to > from) return end;
  }
  return end;
}
