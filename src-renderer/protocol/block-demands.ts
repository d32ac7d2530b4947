import type { PipetteLetter, PlanDocument } from '../../src-main/contract/documents.ts';
import { drawSweep } from './lane-drawing.ts';
import { rungsOf } from './ladder-rungs.ts';

export interface BlockDemands {
  /** The lane's unit: the largest change of the command at the block's start, over all sweeps, signed. */
  readonly jump: number;
  readonly from: number;
  readonly to: number;
  /**
   * Current at the first instant of that jump, when the membrane's capacity is a short: I = ΔV / R_access, in pA. Null for
   * an ideal pipette, which knows no limit, and in current clamp. Source: Ohm's law; common practice.
   */
  readonly firstCurrent_pA: number | null;
}

/** What a block asks of the amplifier at its start. Null when the block is not there. */
export function blockDemands(plan: PlanDocument, letter: PipetteLetter, id: string): BlockDemands | null {
  const pipette = plan.rig.pipettes.find((one) => one.letter === letter);
  let best: { jump: number; from: number; to: number } | null = null;
  for (let rung = 0; rung < Math.min(rungsOf(plan.protocol), 10_000); rung += 1) {
    const lane = drawSweep(plan.protocol, rung).lanes.find((one) => one.pipette === letter);
    const block = lane?.blocks.find((one) => one.block.id === id);
    if (!lane || !block) return null;
    const { from, to } = levelsAbout(lane, block.from_ms);
    if (!best || Math.abs(to - from) > Math.abs(best.jump)) best = { jump: to - from, from, to };
  }
  if (!best) return null;
  const access = pipette?.mode === 'voltage clamp' ? pipette.accessResistance_MOhm : 0;
  // mV ÷ MΩ is nA.
  return { ...best, firstCurrent_pA: access > 0 ? (1000 * best.jump) / access : null };
}

function levelsAbout(
  lane: { readonly time_ms: readonly number[]; readonly level: readonly number[]; readonly holding: number },
  at: number,
): { from: number; to: number } {
  const before = lane.time_ms.findLastIndex((time) => time < at);
  const first = lane.time_ms.indexOf(at);
  const last = lane.time_ms.lastIndexOf(at);
  if (at === 0) return { from: lane.holding, to: lane.level[last] ?? lane.holding };
  // No corner here: the command goes on straight through.
  if (first < 0) {
    const level = lane.level[before] ?? lane.holding;
    return { from: level, to: level };
  }
  return { from: lane.level[first] ?? lane.holding, to: lane.level[last] ?? lane.holding };
}
