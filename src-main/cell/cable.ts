// Cable: the pieces of a shape, each a cut cone in one region.
import type { RefusalData } from '../contract/refusal.ts';
import { fromSi, type Metre } from '../units/si.ts';
import { sideArea } from './frustum.ts';
import { bordersWithin, regionAt, type Region } from './regions.ts';
import type { Shape, ShapeBranch } from './shape.ts';

/** From `from` to `to` along its branch, radius linear from r0 to r1. m. */
export interface Piece {
  readonly from: Metre;
  readonly to: Metre;
  readonly r0: Metre;
  readonly r1: Metre;
  readonly region: number;
}

export interface Cable {
  /** By branch; without pieces for a soma sphere and for stems of one sample. */
  readonly pieces: readonly (readonly Piece[])[];
  /** Region of the soma sphere; -1 without one. */
  readonly sphereRegion: number;
}

/** The cable of a shape, cut at region borders. What no region takes goes to `faults`, one fault for each type. */
export function cableOf(shape: Shape, regions: readonly Region[], faults: RefusalData[]): Cable {
  const left = new Map<number, { length: Metre; area: number; nearest: Metre }>();
  const leave = (type: number, distance: Metre, length: Metre, area: number) => {
    const sum = left.get(type) ?? { length: 0, area: 0, nearest: Infinity };
    left.set(type, {
      length: sum.length + length,
      area: sum.area + area,
      nearest: Math.min(sum.nearest, distance),
    });
  };
  const pieces = shape.branches.map((branch) => {
    const cut = piecesOf(branch, regions);
    for (const { piece, type, distance } of cut)
      if (piece.region < 0)
        leave(type, distance, piece.to - piece.from, sideArea(piece.r0, piece.r1, piece.to - piece.from));
    return cut.map(({ piece }) => piece);
  });
  const isSphere = shape.soma?.kind === 'sphere';
  const sphereRegion = isSphere ? regionAt(regions, 1, 0) : -1;
  if (isSphere && sphereRegion < 0) leave(1, 0, 0, 4 * Math.PI * shape.soma.radius ** 2);
  for (const [type, sum] of [...left].sort(([a], [b]) => a - b))
    faults.push({
      code: 'document-field-missing',
      thing: `region for SWC type ${type}`,
      place: 'cell.regions',
      value: `none takes ${leftWords(sum)}`,
      remedy: `give a region with ${type} among its swcTypes that reaches so far`,
    });
  return { pieces, sphereRegion };
}

function leftWords(sum: { length: Metre; area: number; nearest: Metre }): string {
  const area = `${fromSi(sum.area, 'um2').toFixed(1)} µm² of membrane`;
  if (sum.length === 0) return area;
  return `${fromSi(sum.length, 'um').toFixed(1)} µm of cable (${area}), the nearest ${fromSi(sum.nearest, 'um').toFixed(1)} µm from the soma`;
}

function piecesOf(branch: ShapeBranch, regions: readonly Region[]): { piece: Piece; type: number; distance: Metre }[] {
  const cut: { piece: Piece; type: number; distance: Metre }[] = [];
  for (let n = 1; n < branch.at.length; n += 1) {
    const from = branch.at[n - 1]!;
    const to = branch.at[n]!;
    if (to === from) continue;
    const type = branch.type[n]!;
    const start = branch.startDistance;
    // The whole soma is at distance 0.
    const borders = branch.isSoma ? [] : bordersWithin(regions, type, start + from, start + to);
    const ends = [from, ...borders.map((border) => border - start), to];
    const radiusAt = (x: Metre) => {
      const share = (x - from) / (to - from);
      return branch.radius[n - 1]! * (1 - share) + branch.radius[n]! * share;
    };
    for (let e = 1; e < ends.length; e += 1) {
      const a = ends[e - 1]!;
      const b = ends[e]!;
      if (b <= a) continue;
      const distance = branch.isSoma ? 0 : start + (a + b) / 2;
      const region = regionAt(regions, type, distance);
      cut.push({ piece: { from: a, to: b, r0: radiusAt(a), r1: radiusAt(b), region }, type, distance });
    }
  }
  return cut;
}

/**
 * Visits the cut cones between consecutive places of a branch. `places` ascend from 0 to the branch's length; slice n
 * lies between places n and n + 1.
 */
export function eachSlice(
  pieces: readonly Piece[],
  places: readonly Metre[],
  visit: (n: number, region: number, r0: Metre, r1: Metre, length: Metre) => void,
): void {
  let p = 0;
  for (let n = 0; n + 1 < places.length; n += 1) {
    const end = places[n + 1]!;
    let x = places[n]!;
    while (x < end) {
      while (p < pieces.length && pieces[p]!.to <= x) p += 1;
      const piece = pieces[p];
      if (piece === undefined) break;
      const to = Math.min(end, piece.to);
      visit(n, piece.region, radiusWithin(piece, x), radiusWithin(piece, to), to - x);
      x = to;
    }
  }
}

function radiusWithin(piece: Piece, x: Metre): Metre {
  const share = (x - piece.from) / (piece.to - piece.from);
  return piece.r0 * (1 - share) + piece.r1 * share;
}
