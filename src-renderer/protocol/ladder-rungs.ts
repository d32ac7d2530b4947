import type { Block, Ladder, PipetteLetter, ProtocolDocument } from '../../src-main/contract/documents.ts';

export type LadderNumber = Ladder['number'];

/** Numbers of a block that a ladder may change, in the order they are offered. */
export const ladderNumbers: Readonly<Record<Block['kind'], readonly LadderNumber[]>> = {
  hold: ['duration_ms'],
  step: ['level', 'duration_ms'],
  ramp: ['from', 'to', 'duration_ms'],
  'pulse train': ['level', 'base', 'rate_Hz', 'count', 'width_ms', 'duration_ms'],
};

const words: Readonly<Record<LadderNumber, string>> = {
  level: 'level',
  base: 'base level',
  from: 'starts at',
  to: 'ends at',
  duration_ms: 'duration',
  width_ms: 'pulse width',
  rate_Hz: 'rate',
  count: 'pulses',
};

/** The number's name on the screen. */
export function numberWords(number: LadderNumber): string {
  return words[number];
}

/** The unit a block's number is written in; empty for a count. */
export function numberUnit(number: LadderNumber, laneUnit: 'mV' | 'pA'): string {
  if (number === 'duration_ms' || number === 'width_ms') return 'ms';
  if (number === 'rate_Hz') return 'Hz';
  return number === 'count' ? '' : laneUnit;
}

/** How many sweeps one ladder asks for. */
export function rungCount(ladder: Ladder): number {
  return 'list' in ladder.rungs ? ladder.rungs.list.length : ladder.rungs.count;
}

/** The number a ladder gives in a rung; past its end a ladder stays on its last. */
export function rungValue(ladder: Ladder, rung: number): number {
  const last = Math.min(rung, rungCount(ladder) - 1);
  if ('list' in ladder.rungs) return ladder.rungs.list[last] ?? NaN;
  // 0.1·3 is not 0.3 in binary; fourteen digits are more than any rig sets.
  return Number((ladder.rungs.start + ladder.rungs.increment * last).toPrecision(14));
}

/** Rungs of the longest ladder; 1 without a ladder. */
export function rungsOf(protocol: Pick<ProtocolDocument, 'ladders'>): number {
  return Math.max(1, ...protocol.ladders.map(rungCount));
}

/** The whole family is played `repeats` times over. */
export function sweepCount(protocol: Pick<ProtocolDocument, 'ladders' | 'repeats'>): number {
  return rungsOf(protocol) * protocol.repeats;
}

export function rungOfSweep(protocol: Pick<ProtocolDocument, 'ladders'>, sweep: number): number {
  return sweep % rungsOf(protocol);
}

export function laddersOf(protocol: ProtocolDocument, lane: PipetteLetter, block: string): Ladder[] {
  return protocol.ladders.filter((ladder) => ladder.lane === lane && ladder.block === block);
}

/** The block with every ladder on it applied. */
export function blockInRung(block: Block, lane: PipetteLetter, ladders: readonly Ladder[], rung: number): Block {
  const changes = ladders
    .filter((one) => one.lane === lane && one.block === block.id && ladderNumbers[block.kind].includes(one.number))
    .map((one) => [one.number, rungValue(one, rung)] as const);
  return changes.length === 0 ? block : { ...block, ...Object.fromEntries(changes) };
}
