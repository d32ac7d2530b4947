// The main ladder of a plan, as the plan line speaks of it. Pure.
import type { Ladder, PlanDocument } from '../../../src-main/contract/documents.ts';

export interface MainLadder {
  readonly ladder: Ladder;
  readonly index: number;
  readonly first: number;
  readonly last: number;
  readonly increment: number | null;
  readonly count: number;
  readonly unit: string;
}

/** The first ladder, with its two ends; null when no number changes from sweep to sweep. */
export function mainLadder(plan: PlanDocument): MainLadder | null {
  const ladder = plan.protocol.ladders[0];
  if (ladder === undefined) return null;
  const rungs = ladder.rungs;
  const lane = plan.protocol.lanes.find((l) => l.pipette === ladder.lane);
  const unit =
    { duration_ms: 'ms', width_ms: 'ms', rate_Hz: 'Hz', count: '' }[ladder.number as string] ?? lane?.unit ?? '';
  if ('list' in rungs) {
    const first = rungs.list[0] ?? 0;
    return {
      ladder,
      index: 0,
      first,
      last: rungs.list.at(-1) ?? first,
      increment: null,
      count: rungs.list.length,
      unit,
    };
  }
  const last = clean(rungs.start + rungs.increment * (rungs.count - 1));
  return { ladder, index: 0, first: rungs.start, last, increment: rungs.increment, count: rungs.count, unit };
}

/** Moves the first rung; the last stays as near as whole rungs allow, and past it the direction turns round. */
export function withFirstRung(plan: PlanDocument, first: number): PlanDocument {
  const main = mainLadder(plan);
  if (main?.increment == null) return plan;
  const increment = towards(main.last - first, main.increment);
  return withRungs(plan, first, increment, rungsBetween(first, main.last, increment));
}

/** Moves the last rung by changing how many there are; a first rung on its far side turns the direction round. */
export function withLastRung(plan: PlanDocument, last: number): PlanDocument {
  const main = mainLadder(plan);
  if (main?.increment == null) return plan;
  const increment = towards(last - main.first, main.increment);
  return withRungs(plan, main.first, increment, rungsBetween(main.first, last, increment));
}

/** Changes how many rungs there are; start and increment stay. */
export function withRungCount(plan: PlanDocument, count: number): PlanDocument {
  const main = mainLadder(plan);
  return main?.increment == null ? plan : withRungs(plan, main.first, main.increment, count);
}

/** The increment turned to go the way of the span. */
function towards(span: number, increment: number): number {
  return Math.sign(span) * Math.abs(increment) || increment;
}

function rungsBetween(first: number, last: number, increment: number): number {
  if (increment === 0) return 1;
  return Math.max(1, Math.min(10_000, Math.round((last - first) / increment) + 1));
}

function withRungs(plan: PlanDocument, start: number, increment: number, count: number): PlanDocument {
  const ladders = plan.protocol.ladders.map((l, i) =>
    i === 0 ? { ...l, rungs: { ...l.rungs, start, increment, count } } : l,
  );
  return { ...plan, protocol: { ...plan.protocol, ladders } };
}

/** Takes binary noise off sums such as 0.1 · 3. */
function clean(value: number): number {
  return Number(value.toPrecision(12));
}
