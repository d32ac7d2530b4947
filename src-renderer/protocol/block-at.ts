import type { DrawnLane } from './lane-drawing.ts';

/** The block a lane is in at a time; null after its last. */
export function blockAt(lane: DrawnLane, time_ms: number): string | null {
  return lane.blocks.find((one) => time_ms >= one.from_ms && time_ms < one.to_ms)?.block.id ?? null;
}
