import type { PlanDocument, Window } from '../contract/documents.ts';
import { laidBlocks } from '../protocol/lane.ts';

/**
 * Where clamp error is judged: the plan's window, else the whole of the first block a ladder changes on the
 * voltage-clamp lane, else of the longest block there that is not a hold, else of the longest.
 *
 * @returns null when no pipette is in voltage clamp.
 */
export function clampWindowOf(plan: PlanDocument): Window | null {
  const clamp = plan.rig.pipettes.find(({ mode }) => mode === 'voltage clamp');
  const lane = plan.protocol.lanes.find(({ pipette }) => pipette === clamp?.letter);
  if (lane === undefined) return null;
  if (plan.clampWindow) return plan.clampWindow;
  const laddered = plan.protocol.ladders.find((ladder) => ladder.lane === lane.pipette)?.block;
  const blocks = laidBlocks(lane, plan.protocol.ladders, 0).toSorted(
    (a, b) => Number(a.block.kind === 'hold') - Number(b.block.kind === 'hold') || b.end - b.start - (a.end - a.start),
  );
  const block = laddered ?? blocks[0]?.block.id;
  if (block === undefined) return null;
  return {
    lane: lane.pipette,
    from: { block, edge: 'start', offset_ms: 0 },
    to: { block, edge: 'end', offset_ms: 0 },
  };
}
