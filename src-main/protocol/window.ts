import type { Window } from '../contract/documents.ts';
import type { Second } from '../units/si.ts';
import type { LaidBlock } from './lane.ts';
import { secondsOf, ticksOfMs, type Tick } from './ticks.ts';

/** A stretch of one sweep, s from the sweep's start. */
export interface TimeWindow {
  readonly from: Second;
  readonly to: Second;
}

/** What a window needs of a sweep; `LaidSweep` fits. */
export interface BlocksByLane {
  readonly lanes: readonly { readonly pipette: string; readonly blocks: readonly LaidBlock[] }[];
}

/** A window's edges in one sweep: they follow the blocks wherever ladders have moved them. Undefined: no such block. */
export function resolveWindow(window: Window, sweep: BlocksByLane): TimeWindow | undefined {
  const ticks = windowTicks(window, sweep);
  return ticks && { from: secondsOf(ticks.from), to: secondsOf(ticks.to) };
}

/** The same in ticks, for checks that must not round. */
export function windowTicks(window: Window, sweep: BlocksByLane): { from: Tick; to: Tick } | undefined {
  const from = edgeTick(window, 'from', sweep);
  const to = edgeTick(window, 'to', sweep);
  return from === undefined || to === undefined ? undefined : { from, to };
}

/**
 * The block that a window begins in: on a border, the one that begins there. It need not be the block that the window's
 * edge hangs on: "from the end of the hold" is in the step after it.
 */
export function blockWithin(window: Window, sweep: BlocksByLane): LaidBlock | undefined {
  const from = edgeTick(window, 'from', sweep);
  const lane = sweep.lanes.find((candidate) => candidate.pipette === window.lane);
  if (from === undefined || lane === undefined) return undefined;
  // After the last block the lane is held, without a block of its own.
  return (
    lane.blocks.find((laid) => from >= laid.startTick && from < laid.endTick) ?? blockOfEdge(window, 'from', sweep)
  );
}

/** The block a window's edge hangs on, as it lies in this sweep. */
function blockOfEdge(window: Window, edge: 'from' | 'to', sweep: BlocksByLane): LaidBlock | undefined {
  const lane = sweep.lanes.find((candidate) => candidate.pipette === window.lane);
  return lane?.blocks.find((laid) => laid.block.id === window[edge].block);
}

function edgeTick(window: Window, edge: 'from' | 'to', sweep: BlocksByLane): Tick | undefined {
  const laid = blockOfEdge(window, edge, sweep);
  if (laid === undefined) return undefined;
  return (window[edge].edge === 'start' ? laid.startTick : laid.endTick) + ticksOfMs(window[edge].offset_ms);
}
