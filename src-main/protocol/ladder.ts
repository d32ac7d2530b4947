import type { Block, Ladder, ProtocolDocument } from '../contract/documents.ts';

/** How many sweeps a ladder asks for. */
export function rungCount(ladder: Ladder): number {
  return 'list' in ladder.rungs ? ladder.rungs.list.length : ladder.rungs.count;
}

/**
 * The number a ladder gives in a rung: start + increment·rung, one product, so that rung 1000 is as exact as rung 1.
 * A ladder shorter than the longest stays on its last rung.
 */
export function rungValue(ladder: Ladder, rung: number): number {
  const last = Math.min(rung, rungCount(ladder) - 1);
  if (!('list' in ladder.rungs)) return tidy(ladder.rungs.start + ladder.rungs.increment * last);
  return ladder.rungs.list[last] ?? NaN;
}

// 0.1·3 is 0.30000000000000004: fourteen digits are more than any rig sets and give the number the user meant.
function tidy(value: number): number {
  return Number(value.toPrecision(14));
}

/** Rungs of the longest ladder; 1 without a ladder. */
export function rungsOf(protocol: Pick<ProtocolDocument, 'ladders'>): number {
  return Math.max(1, ...protocol.ladders.map(rungCount));
}

/** The whole family is repeated, not each rung: sweep i stands on rung i mod rungs. */
export function rungOfSweep(protocol: Pick<ProtocolDocument, 'ladders'>, sweep: number): number {
  return sweep % rungsOf(protocol);
}

/** Numbers a ladder may change, by kind of block. */
export const ladderNumbers = {
  hold: ['duration_ms'],
  step: ['level', 'duration_ms'],
  ramp: ['from', 'to', 'duration_ms'],
  'pulse train': ['level', 'base', 'duration_ms', 'width_ms', 'rate_Hz', 'count'],
} as const satisfies Record<Block['kind'], readonly Ladder['number'][]>;

/** Whether blocks of this kind have the number at all. */
export function hasNumber(kind: Block['kind'], number: Ladder['number']): boolean {
  return (ladderNumbers[kind] as readonly string[]).includes(number);
}

/** The block as it stands in a rung: every ladder on it applied. */
export function blockInRung(block: Block, lane: string, ladders: readonly Ladder[], rung: number): Block {
  const changes = ladders
    .filter((ladder) => ladder.lane === lane && ladder.block === block.id && hasNumber(block.kind, ladder.number))
    .map((ladder) => [ladder.number, rungValue(ladder, rung)] as const);
  return changes.length === 0 ? block : { ...block, ...Object.fromEntries(changes) };
}
