import type { Block, Lane, Ladder, PipetteLetter, ProtocolDocument } from '../contract/documents.ts';
import { toSi, type Second } from '../units/si.ts';
import { holdSegments } from './blocks/hold.ts';
import { pulseTrainSegments } from './blocks/pulse-train.ts';
import { rampSegments } from './blocks/ramp.ts';
import { stepSegments } from './blocks/step.ts';
import type { CommandPiece } from './command.ts';
import { blockInRung } from './ladder.ts';
import type { Segment } from './segment.ts';
import { secondsOf, ticksOfMs, type Tick } from './ticks.ts';

/** A block as it lies in one sweep: its ladders applied, its edges in time. */
export interface LaidBlock {
  readonly block: Block;
  readonly startTick: Tick;
  readonly endTick: Tick;
  readonly start: Second;
  readonly end: Second;
}

export interface LaidLane {
  readonly pipette: PipetteLetter;
  readonly unit: Lane['unit'];
  /** V or A. */
  readonly holding: number;
  readonly blocks: readonly LaidBlock[];
  /** From 0 to the sweep's end without a gap. */
  readonly command: readonly CommandPiece[];
}

/** The blocks of a lane in one rung, end to end from 0. */
export function laidBlocks(lane: Lane, ladders: readonly Ladder[], rung: number): LaidBlock[] {
  let at: Tick = 0;
  return lane.blocks.map((given) => {
    const block = blockInRung(given, lane.pipette, ladders, rung);
    const startTick = at;
    at += ticksOfMs(block.duration_ms);
    return { block, startTick, endTick: at, start: secondsOf(startTick), end: secondsOf(at) };
  });
}

/** Where the last block ends. */
export function endOfBlocks(blocks: readonly LaidBlock[]): Tick {
  return blocks.at(-1)?.endTick ?? 0;
}

/** All lanes of a rung. */
export function rungBlocks(protocol: Pick<ProtocolDocument, 'lanes' | 'ladders'>, rung: number): LaidBlock[][] {
  return protocol.lanes.map((lane) => laidBlocks(lane, protocol.ladders, rung));
}

/** Where the longest lane ends, and with it the sweep. */
export function longestLane(lanes: readonly (readonly LaidBlock[])[]): Tick {
  return Math.max(0, ...lanes.map(endOfBlocks));
}

/** A lane in one rung, held at its holding level from its last block to the end of the sweep. */
export function layLane(lane: Lane, blocks: readonly LaidBlock[], end: Tick): LaidLane {
  const pieces: CommandPiece[] = [];
  for (const laid of blocks) {
    for (const segment of segmentsOf(laid.block, lane.holding)) append(pieces, segment, laid.startTick, lane.unit);
  }
  const rest = { start: 0, end: end - endOfBlocks(blocks), v0: lane.holding, v1: lane.holding };
  append(pieces, rest, endOfBlocks(blocks), lane.unit);
  return { pipette: lane.pipette, unit: lane.unit, holding: toSi(lane.holding, lane.unit), blocks, command: pieces };
}

function segmentsOf(block: Block, holding: number): Segment[] {
  switch (block.kind) {
    case 'hold':
      return holdSegments(block, holding);
    case 'step':
      return stepSegments(block);
    case 'ramp':
      return rampSegments(block);
    case 'pulse train':
      return pulseTrainSegments(block);
    default:
      return block satisfies never;
  }
}

// Level stretches that go on at the same level become one piece: the solver treats every boundary as a possible jump.
function append(pieces: CommandPiece[], segment: Segment, offset: Tick, unit: Lane['unit']): void {
  if (segment.end <= segment.start) return;
  const piece = {
    start: secondsOf(offset + segment.start),
    end: secondsOf(offset + segment.end),
    v0: toSi(segment.v0, unit),
    v1: toSi(segment.v1, unit),
  };
  const last = pieces.at(-1);
  if (last !== undefined && last.v0 === last.v1 && last.v1 === piece.v0 && piece.v0 === piece.v1) {
    pieces[pieces.length - 1] = { ...last, end: piece.end };
  } else {
    pieces.push(piece);
  }
}
