import type { Block, Lane, PipetteLetter, ProtocolDocument, Window } from '../../src-main/contract/documents.ts';
import { blockInRung, rungOfSweep } from './ladder-rungs.ts';

/** A block as it lies in one sweep, its ladders applied. */
export interface DrawnBlock {
  readonly block: Block;
  readonly from_ms: number;
  readonly to_ms: number;
}

/** One lane of one sweep: the corners of its command, in the lane's unit. A jump is two corners at one time. */
export interface DrawnLane {
  readonly pipette: PipetteLetter;
  readonly unit: Lane['unit'];
  readonly holding: number;
  readonly blocks: readonly DrawnBlock[];
  readonly time_ms: readonly number[];
  readonly level: readonly number[];
}

export interface DrawnSweep {
  readonly sweep: number;
  readonly rung: number;
  readonly duration_ms: number;
  readonly lanes: readonly DrawnLane[];
}

/** Picoseconds, whole: edges of many blocks add up without drift, as they do when the sweep is computed. */
const perMs = 1e9;
const ticks = (ms: number): number => Math.round(ms * perMs);

/**
 * One sweep as it will be played: blocks end to end, ladders applied, every lane held at its holding level to the end of
 * the longest.
 */
export function drawSweep(protocol: ProtocolDocument, sweep: number): DrawnSweep {
  const rung = rungOfSweep(protocol, sweep);
  const laid = protocol.lanes.map((lane) => layBlocks(lane, protocol, rung));
  const end = Math.max(0, ...laid.map((blocks) => ticks(blocks.at(-1)?.to_ms ?? 0)));
  return {
    sweep,
    rung,
    duration_ms: end / perMs,
    lanes: protocol.lanes.map((lane, l) => drawLane(lane, laid[l] ?? [], end)),
  };
}

function layBlocks(lane: Lane, protocol: ProtocolDocument, rung: number): DrawnBlock[] {
  let at = 0;
  return lane.blocks.map((given) => {
    const block = blockInRung(given, lane.pipette, protocol.ladders, rung);
    const from = at;
    at += ticks(block.duration_ms);
    return { block, from_ms: from / perMs, to_ms: at / perMs };
  });
}

function drawLane(lane: Lane, blocks: readonly DrawnBlock[], end: number): DrawnLane {
  const time: number[] = [];
  const level: number[] = [];
  const line = (from: number, to: number, v0: number, v1: number): void => {
    if (to <= from) return;
    const isGoingOn = level.at(-1) === v0;
    if (isGoingOn && v0 === v1 && level.at(-2) === v0) {
      time[time.length - 1] = to / perMs;
      return;
    }
    if (!isGoingOn) {
      time.push(from / perMs);
      level.push(v0);
    }
    time.push(to / perMs);
    level.push(v1);
  };
  for (const drawn of blocks) blockLines(drawn, lane.holding, line);
  line(ticks(blocks.at(-1)?.to_ms ?? 0), end, lane.holding, lane.holding);
  return { pipette: lane.pipette, unit: lane.unit, holding: lane.holding, blocks, time_ms: time, level };
}

function blockLines(
  { block, from_ms, to_ms }: DrawnBlock,
  holding: number,
  line: (from: number, to: number, v0: number, v1: number) => void,
): void {
  const start = ticks(from_ms);
  const end = ticks(to_ms);
  switch (block.kind) {
    case 'hold':
      line(start, end, holding, holding);
      return;
    case 'step':
      line(start, end, block.level, block.level);
      return;
    case 'ramp':
      line(start, end, block.from, block.to);
      return;
    case 'pulse train': {
      let at = start;
      const until = (to: number, v: number): void => {
        if (to <= at) return;
        line(at, Math.min(to, end), v, v);
        at = Math.min(to, end);
      };
      for (let k = 0; k < block.count && at < end; k += 1) {
        const onset = start + Math.round((k * 1000 * perMs) / block.rate_Hz);
        until(onset, block.base);
        until(onset + ticks(block.width_ms), block.level);
      }
      until(end, block.base);
      return;
    }
    default:
      return block satisfies never;
  }
}

/** Where a window lies in a sweep, ms from its start; null when it names a block that is not there. */
export function windowSpan(window: Window, sweep: DrawnSweep): { from_ms: number; to_ms: number } | null {
  const lane = sweep.lanes.find((one) => one.pipette === window.lane);
  const at = (edge: Window['from']): number | null => {
    const drawn = lane?.blocks.find((one) => one.block.id === edge.block);
    if (!drawn) return null;
    return ((edge.edge === 'start' ? ticks(drawn.from_ms) : ticks(drawn.to_ms)) + ticks(edge.offset_ms)) / perMs;
  };
  const from_ms = at(window.from);
  const to_ms = at(window.to);
  return from_ms === null || to_ms === null ? null : { from_ms, to_ms };
}

/**
 * The window clamp error is judged in: the plan's own, else the first block a ladder changes, else the longest that is
 * not a hold; on the given pipette's lane. Null when there is nothing but holds.
 */
export function judgedWindow(
  plan: { readonly clampWindow?: Window | undefined; readonly protocol: ProtocolDocument },
  letter: PipetteLetter,
): Window | null {
  if (plan.clampWindow) return plan.clampWindow;
  const lane = plan.protocol.lanes.find((one) => one.pipette === letter);
  if (!lane) return null;
  const changed = lane.blocks.find((block) =>
    plan.protocol.ladders.some((ladder) => ladder.lane === letter && ladder.block === block.id),
  );
  const active = lane.blocks.filter((block) => block.kind !== 'hold');
  const longest = active.reduce<Block | undefined>(
    (best, block) => (best && best.duration_ms >= block.duration_ms ? best : block),
    undefined,
  );
  const block = changed ?? longest;
  if (!block) return null;
  return {
    lane: letter,
    from: { block: block.id, edge: 'start', offset_ms: 0 },
    to: { block: block.id, edge: 'end', offset_ms: 0 },
  };
}
