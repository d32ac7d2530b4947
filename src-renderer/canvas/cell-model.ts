// The drawn cell as pieces of line, each within one compartment. Made once per drawing and layout; painted many times.
import type { CellDrawing, DrawnBranch } from '../../src-main/contract/results.ts';
import { flatPlaces, type FlatPlaces } from './flat.ts';

/** Piece i runs from points[6i..6i+2] to points[6i+3..6i+5], µm. */
export interface CellModel {
  readonly count: number;
  readonly points_um: Float64Array;
  readonly radius_um: Float32Array;
  readonly compartment: Int32Array;
  readonly branch: Int32Array;
  /** Place along its branch at the piece's start and end, µm. */
  readonly from_um: Float64Array;
  readonly to_um: Float64Array;
  /** The soma as a disc; null where the cell has none. */
  readonly soma: {
    readonly x: number;
    readonly y: number;
    readonly z: number;
    readonly radius_um: number;
    readonly compartment: number;
    readonly branch: number;
    readonly length_um: number;
  } | null;
  readonly isFlat: boolean;
}

interface Pieces {
  readonly points: number[];
  readonly radius: number[];
  readonly compartment: number[];
  readonly branch: number[];
  readonly from: number[];
  readonly to: number[];
}

/** The pieces of a drawing, as traced or laid out flat with path distance across. */
export function cellModel(drawing: CellDrawing, isFlat: boolean): CellModel {
  const flat = isFlat ? flatPlaces(drawing) : null;
  const centres = compartmentsByBranch(drawing);
  const pieces: Pieces = { points: [], radius: [], compartment: [], branch: [], from: [], to: [] };
  const root = drawing.branches.find((b) => b.parent < 0);
  const hasDisc = drawing.soma !== null && root !== undefined;
  for (const branch of drawing.branches) {
    if (hasDisc && branch === root) continue;
    const compartments = centres.get(branch.branch) ?? [];
    if (flat !== null) connect(pieces, branch, flat, compartments[0]?.index ?? -1);
    for (let i = 0; i + 1 < branch.at_um.length; i++) cutPiece(pieces, branch, i, compartments, flat);
  }
  const disc = hasDisc ? somaDisc(drawing, root, flat, centres.get(root.branch) ?? []) : null;
  return {
    count: pieces.branch.length,
    points_um: Float64Array.from(pieces.points),
    radius_um: Float32Array.from(pieces.radius),
    compartment: Int32Array.from(pieces.compartment),
    branch: Int32Array.from(pieces.branch),
    from_um: Float64Array.from(pieces.from),
    to_um: Float64Array.from(pieces.to),
    soma: disc,
    isFlat,
  };
}

interface Centre {
  readonly at: number;
  readonly index: number;
}

function compartmentsByBranch(drawing: CellDrawing): Map<number, Centre[]> {
  const byBranch = new Map<number, Centre[]>();
  const table = drawing.compartments;
  for (let index = 0; index < table.count; index++) {
    const branch = table.branch[index] ?? -1;
    const list = byBranch.get(branch) ?? [];
    list.push({ at: table.at_um[index] ?? 0, index });
    byBranch.set(branch, list);
  }
  for (const list of byBranch.values()) list.sort((a, b) => a.at - b.at);
  return byBranch;
}

/** Cuts one straight piece where one compartment ends and the next begins: halfway between their centres. */
function cutPiece(
  pieces: Pieces,
  branch: DrawnBranch,
  i: number,
  centres: readonly Centre[],
  flat: FlatPlaces | null,
): void {
  const a0 = branch.at_um[i] ?? 0;
  const a1 = branch.at_um[i + 1] ?? a0;
  const edges = [a0];
  for (let c = 0; c + 1 < centres.length; c++) {
    const edge = ((centres[c]?.at ?? 0) + (centres[c + 1]?.at ?? 0)) / 2;
    if (edge > a0 && edge < a1) edges.push(edge);
  }
  edges.push(a1);
  for (let e = 0; e + 1 < edges.length; e++) {
    const from = edges[e] ?? a0;
    const to = edges[e + 1] ?? a1;
    const middle = (from + to) / 2;
    pieces.points.push(...placeOn(branch, i, from, flat), ...placeOn(branch, i, to, flat));
    pieces.radius.push(between(branch.radius_um, i, shareOf(a0, a1, middle)));
    pieces.compartment.push(nearest(centres, middle));
    pieces.branch.push(branch.branch);
    pieces.from.push(from);
    pieces.to.push(to);
  }
}

function placeOn(branch: DrawnBranch, i: number, at: number, flat: FlatPlaces | null): [number, number, number] {
  if (flat !== null) return [branch.startDistance_um + at, flat.height.get(branch.branch) ?? 0, 0];
  const share = shareOf(branch.at_um[i] ?? 0, branch.at_um[i + 1] ?? 0, at);
  const xyz = branch.xyz_um;
  const mix = (axis: number): number => {
    const p = xyz[3 * i + axis] ?? 0;
    return p + share * ((xyz[3 * i + 3 + axis] ?? p) - p);
  };
  return [mix(0), mix(1), mix(2)];
}

/** In the flat layout: the upright line from the parent's height to the branch's own. */
function connect(pieces: Pieces, branch: DrawnBranch, flat: FlatPlaces, compartment: number): void {
  const parent = flat.height.get(branch.parent);
  const own = flat.height.get(branch.branch);
  if (parent === undefined || own === undefined || parent === own) return;
  const x = branch.startDistance_um;
  pieces.points.push(x, parent, 0, x, own, 0);
  pieces.radius.push(Math.min(0.5, branch.radius_um[0] ?? 0.5));
  pieces.compartment.push(compartment);
  pieces.branch.push(branch.branch);
  pieces.from.push(0);
  pieces.to.push(0);
}

function somaDisc(
  drawing: CellDrawing,
  root: DrawnBranch,
  flat: FlatPlaces | null,
  centres: readonly Centre[],
): CellModel['soma'] {
  if (drawing.soma === null) return null;
  const [x, y, z] = flat === null ? drawing.soma.xyz_um : [0, flat.height.get(root.branch) ?? 0, 0];
  const length_um = root.at_um.at(-1) ?? 0;
  const compartment = nearest(centres, length_um / 2);
  return { x, y, z, radius_um: drawing.soma.radius_um, compartment, branch: root.branch, length_um };
}

function nearest(centres: readonly Centre[], at: number): number {
  let best = -1;
  let miss = Infinity;
  for (const centre of centres) {
    const d = Math.abs(centre.at - at);
    if (d < miss) {
      miss = d;
      best = centre.index;
    }
  }
  return best;
}

function shareOf(from: number, to: number, at: number): number {
  return to > from ? (at - from) / (to - from) : 0;
}
function between(values: Float64Array, i: number, share: number): number {
  const v = values[i] ?? 0;
  return v + share * ((values[i + 1] ?? v) - v);
}

/** Every end of every piece and the soma's extent: what a camera must show. x, y, z in turn. */
export function extent(model: CellModel): Float64Array {
  if (model.soma === null) return model.points_um;
  const { x, y, z, radius_um: r } = model.soma;
  const disc = [x - r, y - r, z, x + r, y + r, z];
  const all = new Float64Array(model.points_um.length + disc.length);
  all.set(model.points_um);
  all.set(disc, model.points_um.length);
  return all;
}
