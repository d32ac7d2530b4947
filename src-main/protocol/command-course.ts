// Reading a command: its value at a time, its value at every sample, the times at which it jumps or bends.
import type { Second } from '../units/si.ts';
import type { CommandPiece } from './command.ts';

/** Times closer than this part of a sampling interval are the same: edges carry a rounding of their own. */
const same = 1e-6;

/**
 * A reader that walks forward through a command. Ask with times that do not go back.
 *
 * @returns the value from the right: at a jump the new level; at and after the end the last value.
 */
export function commandReader(pieces: readonly CommandPiece[], sampling: Second): (time: Second) => number {
  const hair = same * sampling;
  let p = 0;
  return (time) => {
    while (p < pieces.length - 1 && (pieces[p]?.end ?? Infinity) <= time + hair) p += 1;
    const piece = pieces[p];
    return piece === undefined ? NaN : valueIn(piece, time);
  };
}

/** The value of a piece at a time; its end values outside. */
export function valueIn(piece: CommandPiece, time: Second): number {
  if (piece.v0 === piece.v1 || time <= piece.start) return piece.v0;
  if (time >= piece.end) return piece.v1;
  return piece.v0 + ((piece.v1 - piece.v0) * (time - piece.start)) / (piece.end - piece.start);
}

/** The command at samples 0, h, 2h ... */
export function sampledCommand(pieces: readonly CommandPiece[], sampling: Second, samples: number): Float64Array {
  const at = commandReader(pieces, sampling);
  return Float64Array.from({ length: samples }, (_, i) => at(i * sampling));
}

/** Where any of the commands jumps or bends, s, ascending, the sweep's start and end left out. */
export function commandBreaks(commands: readonly (readonly CommandPiece[])[]): Second[] {
  const starts = commands.flatMap((pieces) => pieces.slice(1).map(({ start }) => start));
  return [...new Set(starts)].sort((a, b) => a - b);
}

/** Whether a break falls on a time. */
export function isBreak(breaks: readonly Second[], time: Second, sampling: Second): boolean {
  return breaks.some((at) => Math.abs(at - time) <= same * sampling);
}

/** The one level the command has from `from` to `to`; null where it changes in between. */
export function levelBetween(
  pieces: readonly CommandPiece[],
  from: Second,
  to: Second,
  sampling: Second,
): number | null {
  const hair = same * sampling;
  const inside = pieces.filter((piece) => piece.start < to - hair && piece.end > from + hair);
  const level = inside[0]?.v0;
  return level !== undefined && inside.every(({ v0, v1 }) => v0 === level && v1 === level) ? level : null;
}
