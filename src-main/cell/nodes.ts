// Where the centres of compartments lie along a branch.
import { refuse } from '../units/refuse.ts';
import type { Metre } from '../units/si.ts';
import type { Piece } from './cable.ts';
import type { MakeUp } from './make-up.ts';

/** Compartments are at most this share of the length constant at 100 Hz. */
const share = 0.1;
const frequency = 100;

/** More compartments than this are refused. Design choice: a traced cell has a few thousand. */
export const mostCompartments = 200_000;

/**
 * Places of compartment centres on a branch, from 0 to its length: all of `fixed`, and between two of them so many, evenly
 * in length constants, that neighbours are at most 0.1 λ apart.
 *
 *     λ_f = ½·√(d / (π·f·Ri·Cm)), f = 100 Hz, Cm with spines
 *
 * Along a cone with d linear, ∫ dx/λ from its start is 4·√(π·f·Ri·Cm)·(√d(x) − √d0)·L/(d1 − d0), which is inverted exactly.
 *
 * @param fixed ascending, first 0, last the branch's length.
 * @param fineness 0.5 halves every distance; the places of 1 are then among those of 0.5.
 * @throws Refusal `too-large` when there would be more places than a grid may have.
 * @source rule and λ_f: Hines and Carnevale (2001), Neuroscientist 7:123-135 (from memory).
 */
export function nodePlaces(
  pieces: readonly Piece[],
  makeUps: readonly MakeUp[],
  fixed: readonly Metre[],
  fineness: number,
): Metre[] {
  const places: Metre[] = [0];
  const ends = electrotonicEnds(pieces, makeUps);
  let p = 0;
  for (let n = 0; n + 1 < fixed.length; n += 1) {
    const from = electrotonicAt(pieces, ends, fixed[n]!);
    const to = electrotonicAt(pieces, ends, fixed[n + 1]!);
    // A hair's breadth of rounding must not add a compartment.
    const count = Math.ceil(Math.max(1, Math.ceil((to - from) / share - 1e-9)) / fineness - 1e-9);
    if (places.length + count > mostCompartments) return refuseTooLarge();
    for (let k = 1; k < count; k += 1) {
      const wanted = from + ((to - from) * k) / count;
      while (p < pieces.length - 1 && ends[p]! < wanted) p += 1;
      const start = p === 0 ? 0 : ends[p - 1]!;
      places.push(placeWithin(pieces[p]!, (wanted - start) / (ends[p]! - start)));
    }
    places.push(fixed[n + 1]!);
  }
  return places;
}

/** @throws Refusal `too-large`. */
export function refuseTooLarge(): never {
  return refuse('too-large', {
    thing: 'grid',
    place: 'cell.shape',
    value: `more than ${mostCompartments} compartments`,
    remedy: 'check that the shape is in micrometres and the axial resistivity in Ω·cm; or cut off what you do not need',
  });
}

/** ∫ dx/λ from the branch's start to the end of each piece. */
function electrotonicEnds(pieces: readonly Piece[], makeUps: readonly MakeUp[]): Float64Array {
  const ends = new Float64Array(pieces.length);
  let sum = 0;
  pieces.forEach((piece, n) => {
    const { axial, capacitance, spineFactor } = makeUps[piece.region]!;
    const scale = 2 * Math.sqrt(Math.PI * frequency * axial * capacitance * spineFactor);
    const roots = Math.sqrt(2 * piece.r0) + Math.sqrt(2 * piece.r1);
    sum += (scale * 2 * (piece.to - piece.from)) / roots;
    ends[n] = sum;
  });
  return ends;
}

function electrotonicAt(pieces: readonly Piece[], ends: Float64Array, x: Metre): number {
  const n = pieces.findIndex((piece) => x <= piece.to);
  if (n < 0) return ends.at(-1) ?? 0;
  const piece = pieces[n]!;
  const start = n === 0 ? 0 : ends[n - 1]!;
  const length = piece.to - piece.from;
  const along = Math.max(0, x - piece.from) / length;
  const d0 = 2 * piece.r0;
  const d1 = 2 * piece.r1;
  const d = d0 * (1 - along) + d1 * along;
  // (√d − √d0)/(√d1 − √d0) without the division of 0 by 0 in a cylinder.
  const covered = (along * (Math.sqrt(d0) + Math.sqrt(d1))) / (Math.sqrt(d0) + Math.sqrt(d));
  return start + covered * (ends[n]! - start);
}

/** The place at which a share of a piece's ∫ dx/λ is passed. */
function placeWithin(piece: Piece, covered: number): Metre {
  const s0 = Math.sqrt(2 * piece.r0);
  const s1 = Math.sqrt(2 * piece.r1);
  // √d is linear in ∫ dx/λ, hence d quadratic: x/L = u·(2·s0 + u·(s1 − s0))/(s0 + s1).
  const along = (covered * (2 * s0 + covered * (s1 - s0))) / (s0 + s1);
  return piece.from + along * (piece.to - piece.from);
}
