// Every change to a protocol leaves a plan that the documents' schema accepts, with no window or ladder left hanging.
import { describe, expect, it } from 'vitest';
import { planSchema, type PlanDocument } from '../../src-main/contract/documents.ts';
import * as edits from '../../src-renderer/protocol/edits.ts';
import { addLadder, asList, asSteps, moveLadder, turned } from '../../src-renderer/protocol/ladder-edits.ts';
import { rungValue } from '../../src-renderer/protocol/ladder-rungs.ts';
import { drawSweep, judgedWindow, windowSpan } from '../../src-renderer/protocol/lane-drawing.ts';
import {
  addReading,
  removeReading,
  setBaseline,
  setClampWindow,
  wholeBlock,
} from '../../src-renderer/protocol/window-edits.ts';

const plan: PlanDocument = planSchema.parse({
  kind: 'plan',
  format: 1,
  name: 'activation',
  cell: {
    kind: 'cell',
    format: 1,
    name: 'ball',
    surroundings: { temperature_C: 22 },
    compartments: [{ name: 'ball', area_um2: 1000, capacitance_uF_cm2: 1, channels: {} }],
    couplings_nS: [],
  },
  rig: {
    kind: 'rig',
    format: 1,
    name: 'rig',
    pipettes: [{ letter: 'A', site: { compartment: 'ball' }, mode: 'voltage clamp', accessResistance_MOhm: 10 }],
  },
  protocol: {
    kind: 'protocol',
    format: 1,
    name: 'steps',
    sampling_us: 50,
    sweepInterval_ms: 1000,
    lanes: [
      {
        pipette: 'A',
        unit: 'mV',
        holding: -80,
        blocks: [
          { kind: 'hold', id: 'before', duration_ms: 10 },
          { kind: 'step', id: 'test', duration_ms: 25, level: -40 },
          { kind: 'hold', id: 'after', duration_ms: 15 },
        ],
      },
    ],
    ladders: [{ lane: 'A', block: 'test', number: 'level', rungs: { start: -80, increment: 5, count: 25 } }],
    readings: [
      {
        id: 'peak',
        name: 'peak',
        pipette: 'A',
        measure: 'peak',
        window: {
          lane: 'A',
          from: { block: 'test', edge: 'start', offset_ms: 1 },
          to: { block: 'test', edge: 'end', offset_ms: 0 },
        },
        baseline: wholeBlock('A', 'before'),
      },
    ],
  },
  question: { reading: 'peak', bias_percent: 10 },
});

const ids = (of: PlanDocument): string[] => edits.laneOf(of, 'A')?.blocks.map((block) => block.id) ?? [];

describe('protocol changes', () => {
  it('each gives a plan the schema accepts, and leaves the plan before untouched', () => {
    const before = JSON.stringify(plan);
    const results = [
      ...(['hold', 'step', 'ramp', 'pulse train'] as const).map((kind) => edits.addBlock(plan, 'A', kind, 'test').plan),
      edits.duplicateBlock(plan, 'A', 'test').plan,
      edits.splitBlock(plan, 'A', 'test'),
      edits.deleteBlock(plan, 'A', 'test'),
      edits.moveBlock(plan, 'A', 'test', -1),
      edits.setKind(plan, 'A', 'test', 'ramp'),
      edits.setNumber(plan, 'A', 'test', 'level', 20),
      addLadder(plan, 'A', 'after', 'duration_ms'),
      addReading(plan, 'A', 'late', 'after'),
      removeReading(plan, 'peak'),
      setBaseline(plan, 'peak', null),
      setClampWindow(plan, wholeBlock('A', 'after')),
    ];
    for (const result of results) {
      expect(planSchema.safeParse(result).error?.issues).toBeUndefined();
      expect(result).not.toEqual(plan);
    }
    expect(JSON.stringify(plan)).toBe(before);
  });

  it('a block added behind another stands behind it under a name of its own', () => {
    const { plan: added, id } = edits.addBlock(plan, 'A', 'step', 'test');
    expect(ids(added)).toEqual(['before', 'test', id, 'after']);
    expect(new Set(ids(added)).size).toBe(4);
  });

  it('deleting a block takes its ladders along and leaves every window within the sweep', () => {
    const cut = edits.deleteBlock(plan, 'A', 'test');
    expect(ids(cut)).toEqual(['before', 'after']);
    expect(cut.protocol.ladders).toEqual([]);
    const reading = cut.protocol.readings[0];
    const span = reading && windowSpan(reading.window, drawSweep(cut.protocol, 0));
    // It lay from 11 to 35 ms; the sweep now ends at 25 ms.
    expect(span).toEqual({ from_ms: 11, to_ms: 25 });
  });

  it('the last block of a lane cannot be deleted', () => {
    const one = edits.deleteBlock(edits.deleteBlock(plan, 'A', 'test'), 'A', 'after');
    expect(edits.deleteBlock(one, 'A', 'before')).toBe(one);
  });

  it('splitting a block changes nothing that is played', () => {
    const split = edits.splitBlock(plan, 'A', 'test');
    expect(ids(split)).toHaveLength(4);
    for (const sweep of [0, 24]) {
      const [was, is] = [drawSweep(plan.protocol, sweep), drawSweep(split.protocol, sweep)];
      expect(is.lanes[0]?.time_ms).toEqual(was.lanes[0]?.time_ms);
      expect(is.lanes[0]?.level).toEqual(was.lanes[0]?.level);
    }
  });

  it('a stretched edge lands on a whole number of sampling intervals and never on none', () => {
    expect(edits.snapped(12.3456, 50)).toBe(12.35);
    expect(edits.snapped(-3, 50)).toBe(0.05);
    expect(edits.snapped(1, 30)).toBe(0.99);
  });

  it('a ladder written out as a list, and back as steps, has the same rungs', () => {
    const ladder = plan.protocol.ladders[0];
    if (!ladder) throw new Error('the plan has a ladder');
    const there = { ...ladder, rungs: asList(ladder) };
    const back = { ...ladder, rungs: asSteps(there) };
    const twice = { ...ladder, rungs: turned({ ...ladder, rungs: turned(ladder) }) };
    for (let rung = 0; rung < 25; rung += 1) {
      expect(rungValue(there, rung)).toBe(-80 + 5 * rung);
      expect(rungValue(back, rung)).toBe(-80 + 5 * rung);
      expect(rungValue(twice, rung)).toBe(-80 + 5 * rung);
    }
  });

  it('a ladder moved to another number starts where that number stands', () => {
    const key = { lane: 'A', block: 'test', number: 'level' } as const;
    const moved = moveLadder(plan, key, 'duration_ms').protocol.ladders;
    expect(moved).toHaveLength(1);
    expect(moved[0] && rungValue(moved[0], 0)).toBe(25);
  });

  it('clamp error is judged in the block with the ladder, and without one in the longest that is not a hold', () => {
    expect(judgedWindow(plan, 'A')?.from.block).toBe('test');
    const { plan: longer, id } = edits.addBlock(plan, 'A', 'pulse train', 'test');
    const bare = { ...longer, protocol: { ...longer.protocol, ladders: [] } };
    expect(judgedWindow(bare, 'A')?.from.block).toBe(id);
  });

  it('a question goes with the reading it asked for', () => {
    expect(removeReading(plan, 'peak').question).toBeUndefined();
    expect(removeReading(addReading(plan, 'A', 'late', null), 'late').question?.reading).toBe('peak');
  });
});
