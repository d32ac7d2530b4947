// Changes to a plan's protocol, each a pure function of the plan. What hangs on a block goes with it or finds new hold.
import type {
  Block,
  BlockKind,
  Ladder,
  Lane,
  PipetteLetter,
  PlanDocument,
  ProtocolDocument,
} from '../../src-main/contract/documents.ts';
import { newBlock } from './block-words.ts';
import { ladderNumbers } from './ladder-rungs.ts';
import { reanchored } from './window-edits.ts';

export function withProtocol(plan: PlanDocument, change: Partial<ProtocolDocument>): PlanDocument {
  return { ...plan, protocol: { ...plan.protocol, ...change } };
}

export function laneOf(plan: PlanDocument, letter: PipetteLetter): Lane | undefined {
  return plan.protocol.lanes.find((lane) => lane.pipette === letter);
}

export function blockOf(plan: PlanDocument, letter: PipetteLetter, id: string): Block | undefined {
  return laneOf(plan, letter)?.blocks.find((block) => block.id === id);
}

function withLane(plan: PlanDocument, letter: PipetteLetter, change: (lane: Lane) => Lane): PlanDocument {
  return withProtocol(plan, {
    lanes: plan.protocol.lanes.map((lane) => (lane.pipette === letter ? change(lane) : lane)),
  });
}

/** A name no block, ladder or reading of the plan has yet: the stem with the first free number behind it. */
export function freeId(plan: PlanDocument, stem: string): string {
  const taken = new Set([
    ...plan.protocol.lanes.flatMap((lane) => lane.blocks.map((block) => block.id)),
    ...plan.protocol.readings.map((reading) => reading.id),
  ]);
  const plain =
    stem
      .toLowerCase()
      .replaceAll(/[^a-z0-9]+/g, '-')
      .replaceAll(/^-+|-+$/g, '')
      .slice(0, 30) || 'block';
  for (let n = 1; ; n += 1) {
    const id = n === 1 ? plain : `${plain}-${n}`;
    if (!taken.has(id)) return id;
  }
}

/** A level to begin with: 60 mV above holding, which is where channels open; 50 pA above for currents. */
function firstLevel(lane: Lane): number {
  return lane.holding + (lane.unit === 'mV' ? 60 : 50);
}

/** Puts a new block behind the given one, or at the lane's end. The new block's id comes with it. */
export function addBlock(
  plan: PlanDocument,
  letter: PipetteLetter,
  kind: BlockKind,
  behind: string | null,
): { plan: PlanDocument; id: string } {
  const id = freeId(plan, kind);
  const changed = withLane(plan, letter, (lane) => {
    const at = lane.blocks.findIndex((block) => block.id === behind);
    const block = newBlock(kind, id, firstLevel(lane), lane.holding);
    return { ...lane, blocks: lane.blocks.toSpliced(at < 0 ? lane.blocks.length : at + 1, 0, block) };
  });
  return { plan: changed, id };
}

/** A copy right behind the block, with copies of its ladders. */
export function duplicateBlock(
  plan: PlanDocument,
  letter: PipetteLetter,
  id: string,
): { plan: PlanDocument; id: string } {
  const block = blockOf(plan, letter, id);
  if (!block) return { plan, id };
  const copy = freeId(plan, id.replace(/-\d+$/, ''));
  const withCopy = withLane(plan, letter, (lane) => ({
    ...lane,
    blocks: lane.blocks.flatMap((one) => (one.id === id ? [one, { ...one, id: copy }] : [one])),
  }));
  const ladders = plan.protocol.ladders.filter((ladder) => ladder.lane === letter && ladder.block === id);
  return {
    plan: withProtocol(withCopy, {
      ladders: [...plan.protocol.ladders, ...ladders.map((ladder) => ({ ...ladder, block: copy }))],
    }),
    id: copy,
  };
}

/** Cuts a block in two halves of equal length; a ladder on its level stays on both, one on its duration on the first. */
export function splitBlock(plan: PlanDocument, letter: PipetteLetter, id: string): PlanDocument {
  const block = blockOf(plan, letter, id);
  if (!block || block.kind === 'pulse train') return plan;
  const half = snapped(block.duration_ms / 2, plan.protocol.sampling_us);
  const rest = Number((block.duration_ms - half).toPrecision(12));
  if (!(half > 0) || !(rest > 0)) return plan;
  const second = freeId(plan, id.replace(/-\d+$/, ''));
  const middle = block.kind === 'ramp' ? block.from + (block.to - block.from) * (half / block.duration_ms) : 0;
  const pair: Block[] =
    block.kind === 'ramp'
      ? [
          { ...block, duration_ms: half, to: middle },
          { ...block, id: second, duration_ms: rest, from: middle },
        ]
      : [
          { ...block, duration_ms: half },
          { ...block, id: second, duration_ms: rest },
        ];
  const cut = withLane(plan, letter, (lane) => ({
    ...lane,
    blocks: lane.blocks.flatMap((one) => (one.id === id ? pair : [one])),
  }));
  const copies = plan.protocol.ladders
    .filter((ladder) => ladder.lane === letter && ladder.block === id && ladder.number === 'level')
    .map((ladder) => ({ ...ladder, block: second }));
  return withProtocol(cut, { ladders: [...cut.protocol.ladders, ...copies] });
}

/** Takes a block out with its ladders; windows that hung on it keep their place in time. The last block stays. */
export function deleteBlock(plan: PlanDocument, letter: PipetteLetter, id: string): PlanDocument {
  const lane = laneOf(plan, letter);
  if (!lane || lane.blocks.length < 2 || !blockOf(plan, letter, id)) return plan;
  const without = withProtocol(
    withLane(plan, letter, (one) => ({ ...one, blocks: one.blocks.filter((block) => block.id !== id) })),
    { ladders: plan.protocol.ladders.filter((ladder) => ladder.lane !== letter || ladder.block !== id) },
  );
  return reanchored(plan, without, letter, id);
}

/** Moves a block one place left (−1) or right (1) in its lane. */
export function moveBlock(plan: PlanDocument, letter: PipetteLetter, id: string, by: -1 | 1): PlanDocument {
  return withLane(plan, letter, (lane) => {
    const at = lane.blocks.findIndex((block) => block.id === id);
    const block = lane.blocks[at];
    if (!block || at + by < 0 || at + by >= lane.blocks.length) return lane;
    return { ...lane, blocks: lane.blocks.toSpliced(at, 1).toSpliced(at + by, 0, block) };
  });
}

/** Sets one number of a block. */
export function setNumber(
  plan: PlanDocument,
  letter: PipetteLetter,
  id: string,
  number: Ladder['number'],
  value: number,
): PlanDocument {
  return withLane(plan, letter, (lane) => ({
    ...lane,
    blocks: lane.blocks.map((block) => (block.id === id ? { ...block, [number]: value } : block)),
  }));
}

/** Makes a block another kind and keeps its length and, where both have one, its level. Ladders that no longer fit go. */
export function setKind(plan: PlanDocument, letter: PipetteLetter, id: string, kind: BlockKind): PlanDocument {
  const lane = laneOf(plan, letter);
  const old = blockOf(plan, letter, id);
  if (!lane || !old || old.kind === kind) return plan;
  const level = 'level' in old ? old.level : 'to' in old ? old.to : firstLevel(lane);
  const block = { ...newBlock(kind, id, level, lane.holding), duration_ms: old.duration_ms };
  const changed = withLane(plan, letter, (one) => ({
    ...one,
    blocks: one.blocks.map((each) => (each.id === id ? block : each)),
  }));
  return withProtocol(changed, {
    ladders: plan.protocol.ladders.filter(
      (ladder) => ladder.lane !== letter || ladder.block !== id || ladderNumbers[kind].includes(ladder.number),
    ),
  });
}

export function setHolding(plan: PlanDocument, letter: PipetteLetter, holding: number): PlanDocument {
  return withLane(plan, letter, (lane) => ({ ...lane, holding }));
}

/** The nearest whole number of sampling intervals, at least one. In ms. */
export function snapped(duration_ms: number, sampling_us: number): number {
  const intervals = Math.max(1, Math.round((duration_ms * 1000) / sampling_us));
  return Number(((intervals * sampling_us) / 1000).toPrecision(12));
}

/** A lane for a pipette that has none: holding for as long as the others last. */
export function addLane(plan: PlanDocument, letter: PipetteLetter, duration_ms: number): PlanDocument {
  const pipette = plan.rig.pipettes.find((one) => one.letter === letter);
  if (!pipette || laneOf(plan, letter)) return plan;
  const isVoltage = pipette.mode === 'voltage clamp';
  const lane: Lane = {
    pipette: letter,
    unit: isVoltage ? 'mV' : 'pA',
    holding: isVoltage ? -70 : 0,
    blocks: [{ kind: 'hold', id: freeId(plan, 'hold'), duration_ms }],
  };
  return withProtocol(plan, { lanes: [...plan.protocol.lanes, lane] });
}
