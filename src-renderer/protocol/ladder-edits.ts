// Changes to a plan's ladders, each a pure function of the plan.
import type { Ladder, PipetteLetter, PlanDocument } from '../../src-main/contract/documents.ts';
import { blockOf, withProtocol } from './edits.ts';
import { rungCount, rungValue } from './ladder-rungs.ts';

type Key = Pick<Ladder, 'lane' | 'block' | 'number'>;

export function isSameLadder(a: Key, b: Key): boolean {
  return a.lane === b.lane && a.block === b.block && a.number === b.number;
}

const firstRungs: Readonly<Record<Ladder['number'], { increment: number; count: number }>> = {
  level: { increment: 10, count: 10 },
  base: { increment: 10, count: 10 },
  from: { increment: 10, count: 10 },
  to: { increment: 10, count: 10 },
  duration_ms: { increment: 10, count: 8 },
  width_ms: { increment: 1, count: 5 },
  rate_Hz: { increment: 10, count: 5 },
  count: { increment: 1, count: 5 },
};

/** A ladder on a number that has none, starting where the number stands. */
export function addLadder(
  plan: PlanDocument,
  lane: PipetteLetter,
  block: string,
  number: Ladder['number'],
): PlanDocument {
  const found = blockOf(plan, lane, block);
  const key = { lane, block, number };
  const start = found && number in found ? (found as unknown as Record<string, unknown>)[number] : undefined;
  if (typeof start !== 'number' || plan.protocol.ladders.some((one) => isSameLadder(one, key))) return plan;
  const ladder: Ladder = { ...key, rungs: { start, ...firstRungs[number] } };
  return withProtocol(plan, { ladders: [...plan.protocol.ladders, ladder] });
}

export function removeLadder(plan: PlanDocument, key: Key): PlanDocument {
  return withProtocol(plan, { ladders: plan.protocol.ladders.filter((one) => !isSameLadder(one, key)) });
}

export function setRungs(plan: PlanDocument, key: Key, rungs: Ladder['rungs']): PlanDocument {
  return withProtocol(plan, {
    ladders: plan.protocol.ladders.map((one) => (isSameLadder(one, key) ? { ...one, rungs } : one)),
  });
}

/** Puts the ladder on another number of its block; the rungs then start at that number's own value. */
export function moveLadder(plan: PlanDocument, key: Key, number: Ladder['number']): PlanDocument {
  if (key.number === number) return plan;
  return addLadder(removeLadder(plan, key), key.lane, key.block, number);
}

/** The same rungs written out one by one. */
export function asList(ladder: Ladder): Ladder['rungs'] {
  return { list: Array.from({ length: rungCount(ladder) }, (_, rung) => rungValue(ladder, rung)) };
}

/** The rungs as start and increment: exact for an even list, else through its first and last. */
export function asSteps(ladder: Ladder): Ladder['rungs'] {
  const count = rungCount(ladder);
  const start = rungValue(ladder, 0);
  const span = rungValue(ladder, count - 1) - start;
  return { start, increment: count > 1 ? Number((span / (count - 1)).toPrecision(12)) : 10, count };
}

/** The same rungs in the other order. */
export function turned(ladder: Ladder): Ladder['rungs'] {
  if ('list' in ladder.rungs) return { list: ladder.rungs.list.toReversed() };
  return { ...ladder.rungs, start: rungValue(ladder, ladder.rungs.count - 1), increment: -ladder.rungs.increment };
}
