// Changes of the rig that keep the rest of the plan in step. Pure: plan in, plan out.
import type {
  Block,
  Ladder,
  Lane,
  PipetteDocument,
  PipetteLetter,
  PlanDocument,
  Site,
} from '../../../src-main/contract/documents.ts';

export type Mode = PipetteDocument['mode'];

/** The pipette of that letter, or null. */
export function pipetteOf(plan: PlanDocument, letter: PipetteLetter): PipetteDocument | null {
  return plan.rig.pipettes.find((p) => p.letter === letter) ?? null;
}

/** The plan with some fields of one pipette replaced. */
export function withPipette(plan: PlanDocument, letter: PipetteLetter, fields: Partial<PipetteDocument>): PlanDocument {
  const pipettes = plan.rig.pipettes.map((p) => (p.letter === letter ? { ...p, ...fields } : p));
  return { ...plan, rig: { ...plan.rig, pipettes } };
}

/** Moves a pipette; a site that is the same changes nothing. */
export function withSite(plan: PlanDocument, letter: PipetteLetter, site: Site): PlanDocument {
  const now = pipetteOf(plan, letter)?.site;
  return now === undefined || JSON.stringify(now) === JSON.stringify(site) ? plan : withPipette(plan, letter, { site });
}

/** Where a voltage-clamp lane holds when nothing better is known: mV on the dial. */
const usualHolding_mV = -70;

/**
 * Switches a pipette's mode and turns its lane's levels into the other unit through the input resistance
 * (ΔV = I·R): a voltage step becomes the current that would make it at rest, and back. Rounded to 1 mV and 10 pA;
 * a starting point to edit, not an equivalence. A ladder of levels becomes small steps to both sides of 0 pA, for the
 * currents of a voltage-clamp family would drive the cell far out of its range. The bridge is balanced to the access
 * resistance, and readings that say current say voltage, and back.
 *
 * @param inputResistance_MOhm of the cell; 100 where it is not known.
 */
export function withMode(
  plan: PlanDocument,
  letter: PipetteLetter,
  mode: Mode,
  inputResistance_MOhm: number | null,
): PlanDocument {
  const pipette = pipetteOf(plan, letter);
  if (pipette === null || pipette.mode === mode) return plan;
  const lane = plan.protocol.lanes.find((l) => l.pipette === letter);
  const bridge_MOhm = mode === 'voltage clamp' ? 0 : pipette.accessResistance_MOhm;
  const moved = withPipette(plan, letter, { mode, bridge_MOhm });
  const unit = mode === 'voltage clamp' ? 'mV' : 'pA';
  if (lane === undefined || lane.unit === unit) return moved;
  const turn = turning(lane, inputResistance_MOhm ?? 100);
  const protocol = {
    ...plan.protocol,
    lanes: plan.protocol.lanes.map((l) => (l.pipette === letter ? turnedLane(l, unit, turn) : l)),
    ladders: plan.protocol.ladders.map((l) => (l.lane === letter ? turnedLadder(l, turn) : l)),
    readings: plan.protocol.readings.map((r) => (r.pipette === letter ? { ...r, name: renamed(r.name, mode) } : r)),
  };
  return { ...moved, protocol };
}

/** "Peak current" to "Peak voltage", and back; another name stays. */
function renamed(name: string, mode: Mode): string {
  const [from, to] = mode === 'current clamp' ? (['current', 'voltage'] as const) : (['voltage', 'current'] as const);
  const other = (found: string): string => (found.startsWith(from.charAt(0)) ? to : to.replace(/^./, upper));
  return name.replaceAll(new RegExp(`\\b${from}\\b`, 'gi'), other);
}
const upper = (letter: string): string => letter.toUpperCase();

/** Steps of some 5 mV at rest, two to each side of none: five sweeps that keep a cell near its rest. Common practice. */
function currentLadder(resistance_MOhm: number): Rungs {
  const increment = round125((5 / resistance_MOhm) * 1000);
  return { start: -2 * increment, increment, count: 5 };
}

/** To 10 pA; a current that would round to nothing keeps its first digit. */
function roundCurrent(pA: number): number {
  const rounded = 10 * Math.round(pA / 10) + 0;
  return rounded === 0 && pA !== 0 ? Math.sign(pA) * round125(Math.abs(pA)) : rounded;
}

/** The nearest of 1, 2, 5 times a power of ten, by ratio. */
function round125(value: number): number {
  const decade = 10 ** Math.floor(Math.log10(value));
  const steps = [1, 2, 5, 10].map((m) => Number((m * decade).toPrecision(6)));
  return steps.reduce((best, s) => (Math.abs(Math.log(s / value)) < Math.abs(Math.log(best / value)) ? s : best));
}

type Rungs = Ladder['rungs'];

interface Turning {
  /** Rungs for a ladder of levels, where turning each of them would not do. */
  readonly rungs: Rungs | null;
  readonly level: (value: number) => number;
  readonly difference: (value: number) => number;
  readonly holding: number;
}

function turning(lane: Lane, resistance_MOhm: number): Turning {
  // mV / MΩ = nA = 1000 pA.
  if (lane.unit === 'mV') {
    const difference = (mV: number): number => roundCurrent((mV / resistance_MOhm) * 1000);
    const rungs = currentLadder(resistance_MOhm);
    return { rungs, level: (mV) => difference(mV - lane.holding), difference, holding: 0 };
  }
  const difference = (pA: number): number => Math.round((pA * resistance_MOhm) / 1000) + 0;
  const level = (pA: number): number => usualHolding_mV + difference(pA - lane.holding);
  return { rungs: null, level, difference, holding: usualHolding_mV };
}

function turnedLane(lane: Lane, unit: Lane['unit'], turn: Turning): Lane {
  return { ...lane, unit, holding: turn.holding, blocks: lane.blocks.map((block) => turnedBlock(block, turn)) };
}

function turnedBlock(block: Block, turn: Turning): Block {
  switch (block.kind) {
    case 'hold':
      return block;
    case 'step':
      return { ...block, level: turn.level(block.level) };
    case 'ramp':
      return { ...block, from: turn.level(block.from), to: turn.level(block.to) };
    case 'pulse train':
      return { ...block, level: turn.level(block.level), base: turn.level(block.base) };
    default:
      return block satisfies never;
  }
}

function turnedLadder(ladder: Ladder, turn: Turning): Ladder {
  if (!['level', 'base', 'from', 'to'].includes(ladder.number)) return ladder;
  if (turn.rungs !== null) return { ...ladder, rungs: turn.rungs };
  if ('list' in ladder.rungs) return { ...ladder, rungs: { list: ladder.rungs.list.map(turn.level) } };
  const { start, increment, count } = ladder.rungs;
  // A rung that rounds to nothing would make every sweep the same.
  const smallest = Math.sign(increment);
  return { ...ladder, rungs: { start: turn.level(start), increment: turn.difference(increment) || smallest, count } };
}

/** Adds pipette B in current clamp at the site, with a lane that holds 0 pA as long as A's lane lasts. */
export function withSecondPipette(plan: PlanDocument, site: Site): PlanDocument {
  if (pipetteOf(plan, 'B') !== null) return plan;
  const pipette: PipetteDocument = {
    letter: 'B',
    site,
    mode: 'current clamp',
    // A dendritic pipette is finer than a somatic one: 28 MΩ is common practice.
    accessResistance_MOhm: 28,
    strayCapacitance_pF: 0,
    bridge_MOhm: 28,
  };
  const duration_ms = plan.protocol.lanes[0]?.blocks.reduce((sum, b) => sum + b.duration_ms, 0) ?? 100;
  const lane: Lane = { pipette: 'B', unit: 'pA', holding: 0, blocks: [{ kind: 'hold', id: 'hold-b', duration_ms }] };
  return {
    ...plan,
    rig: { ...plan.rig, pipettes: [...plan.rig.pipettes, pipette] },
    protocol: { ...plan.protocol, lanes: [...plan.protocol.lanes.filter((l) => l.pipette !== 'B'), lane] },
  };
}

/** Takes pipette B away, and with it its lane, its ladders, the readings on it and a question that asked for one. */
export function withoutSecondPipette(plan: PlanDocument): PlanDocument {
  if (pipetteOf(plan, 'B') === null) return plan;
  const { lanes, ladders, readings } = plan.protocol;
  const keptReadings = readings.filter((r) => r.pipette !== 'B' && r.window.lane !== 'B' && r.baseline?.lane !== 'B');
  const { question, clampWindow, ...rest } = plan;
  return {
    ...rest,
    ...(question !== undefined && keptReadings.some((r) => r.id === question.reading) ? { question } : {}),
    ...(clampWindow !== undefined && clampWindow.lane !== 'B' ? { clampWindow } : {}),
    rig: { ...plan.rig, pipettes: plan.rig.pipettes.filter((p) => p.letter !== 'B') },
    protocol: {
      ...plan.protocol,
      lanes: lanes.filter((l) => l.pipette !== 'B'),
      ladders: ladders.filter((l) => l.lane !== 'B'),
      readings: keptReadings,
    },
  };
}
