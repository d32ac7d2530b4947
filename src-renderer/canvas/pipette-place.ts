// Where a pipette lies on the picture: its tip on the cell, its lettered head beside it. Pure.
import type { PipetteLetter } from '../../src-main/contract/documents.ts';
import type { Size } from './camera.ts';

export interface PipettePlace {
  readonly letter: PipetteLetter;
  readonly tip: { readonly x: number; readonly y: number };
  readonly head: { readonly x: number; readonly y: number };
}

export const headRadius = 10;
/** Room at the edge for the head and its two lines of text. */
const margin = { x: 16, top: 62, bottom: 152 };
const reach_px = 98;

/** A comes from the lower left, B from the upper right; near an edge they turn aside rather than leave the picture. */
export function pipettePlace(letter: PipetteLetter, tip: { x: number; y: number }, size: Size): PipettePlace {
  const side = letter === 'A' ? -1 : 1;
  const across = 0.87 * reach_px;
  const hasRoom = letter === 'A' ? tip.x - across > margin.x : tip.x + across < size.width - margin.x;
  const x = tip.x + (hasRoom ? side : -side) * across;
  const y = tip.y - side * 0.5 * reach_px;
  const head = {
    x: Math.max(margin.x, Math.min(size.width - margin.x, x)),
    y: Math.max(margin.top, Math.min(size.height - margin.bottom, y)),
  };
  return { letter, tip, head };
}

/** Which pipette a point lies on: its head first, then its shaft. */
export function pickPipette(places: readonly PipettePlace[], x: number, y: number): PipetteLetter | null {
  const onHead = places.find((p) => Math.hypot(x - p.head.x, y - p.head.y) <= headRadius + 4);
  if (onHead !== undefined) return onHead.letter;
  return places.find((p) => isOnShaft(p, x, y))?.letter ?? null;
}

function isOnShaft({ tip, head }: PipettePlace, x: number, y: number): boolean {
  const dx = head.x - tip.x;
  const dy = head.y - tip.y;
  const length = Math.hypot(dx, dy);
  if (length === 0) return false;
  const along = ((x - tip.x) * dx + (y - tip.y) * dy) / length;
  const aside = Math.abs((x - tip.x) * dy - (y - tip.y) * dx) / length;
  return along > 0 && along < length && aside <= 4 + (6 * along) / length;
}
