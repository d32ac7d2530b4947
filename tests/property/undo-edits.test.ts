// Changes of a plan keep it whole: what they leave behind is a plan again.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { planSchema, type PlanDocument } from '../../src-main/contract/documents.ts';
import { mainLadder, withFirstRung, withLastRung, withRungCount } from '../../src-renderer/state/edits/ladder.ts';
import { withMode, withoutSecondPipette, withSecondPipette } from '../../src-renderer/state/edits/pipette.ts';
import { withMakeUp, withoutRegion, withRegion, withRegionCut } from '../../src-renderer/state/edits/cell.ts';
import { madeCell } from '../../src-renderer/state/made-cell.ts';
import { firstPlan } from '../../src-renderer/state/first-plan.ts';

const cell = madeCell('Cell', { kind: 'tree', cellType: 'layer-5-like pyramidal', seed: 1, size: 1 });
const start = firstPlan(cell);
const isWhole = (plan: PlanDocument): void => expect(planSchema.parse(plan)).toEqual(plan);

describe('changes of the rig', () => {
  it('a new plan, and the same with B, are whole', () => {
    isWhole(start);
    isWhole(withSecondPipette(start, { branch: 1, at_um: 5 }));
  });

  it('removing B undoes adding it: pipette, lane and all', () => {
    expect(withoutSecondPipette(withSecondPipette(start, { branch: 1, at_um: 5 }))).toEqual(start);
  });

  it('removing B takes the readings, ladders and question along that hang on it', () => {
    const both = withSecondPipette(start, { branch: 1, at_um: 5 });
    const reading = { ...start.protocol.readings[0]!, id: 'of-b', pipette: 'B' as const };
    const asked: PlanDocument = {
      ...both,
      question: { reading: 'of-b', bias_percent: 5 },
      protocol: { ...both.protocol, readings: [...both.protocol.readings, reading] },
    };
    const left = withoutSecondPipette(asked);
    expect(left.question).toBeUndefined();
    expect(left.protocol).toEqual(start.protocol);
  });

  it('switching A to current clamp gives small steps to both sides of 0 pA, by the input resistance', () => {
    // 5 mV through 100 MΩ is 50 pA; through 300 MΩ 16.7 pA, nearest to 20; through 40 MΩ 125 pA, nearest to 100.
    for (const [resistance, increment] of [
      [100, 50],
      [300, 20],
      [40, 100],
    ] as const) {
      const plan = withMode(start, 'A', 'current clamp', resistance);
      isWhole(plan);
      expect(plan.protocol.lanes[0]).toMatchObject({ unit: 'pA', holding: 0 });
      expect(plan.protocol.ladders[0]?.rungs).toEqual({ start: -2 * increment, increment, count: 5 });
    }
  });

  it('a small voltage step on a cell of high resistance becomes a small current, not none', () => {
    const block = { kind: 'step', id: 'pulse', duration_ms: 10, level: -80 } as const;
    const lanes = [{ pipette: 'A', unit: 'mV', holding: -70, blocks: [block] }] as const;
    const plan = { ...start, protocol: { ...start.protocol, lanes: [...lanes], ladders: [], readings: [] } };
    // 10 mV over 2300 MΩ is 4.3 pA.
    const now = withMode(plan as unknown as PlanDocument, 'A', 'current clamp', 2300);
    expect(now.protocol.lanes[0]?.blocks[0]).toMatchObject({ level: -5 });
  });

  it('switching A to current clamp balances the bridge to the access resistance; back, there is none', () => {
    const plan = withMode(start, 'A', 'current clamp', 100);
    expect(plan.rig.pipettes[0]).toMatchObject({ accessResistance_MOhm: 12, bridge_MOhm: 12 });
    expect(withMode(plan, 'A', 'voltage clamp', 100).rig.pipettes[0]?.bridge_MOhm).toBe(0);
  });

  it('switching the mode renames readings that say current or voltage, and only those', () => {
    const named = (plan: PlanDocument): string[] => plan.protocol.readings.map((r) => r.name);
    const other = { ...start.protocol.readings[0]!, id: 'own', name: 'Currently best' };
    const plan = { ...start, protocol: { ...start.protocol, readings: [...start.protocol.readings, other] } };
    const there = withMode(plan, 'A', 'current clamp', 100);
    expect(named(there)).toEqual(['Peak voltage', 'Steady voltage', 'Currently best']);
    expect(named(withMode(there, 'A', 'voltage clamp', 100))).toEqual(named(plan));
  });

  it('back in voltage clamp the steps are those the currents would make', () => {
    const back = withMode(withMode(start, 'A', 'current clamp', 100), 'A', 'voltage clamp', 100);
    // −100 pA through 100 MΩ is 10 mV below −70 mV.
    expect(back.protocol.ladders[0]?.rungs).toEqual({ start: -80, increment: 5, count: 5 });
    expect(back.protocol.lanes[0]).toMatchObject({ unit: 'mV', holding: -70 });
  });

  it('never makes a ladder whose rungs are all the same', () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 1e5, noNaN: true }), (resistance) => {
        const there = withMode(start, 'A', 'current clamp', resistance);
        for (const plan of [there, withMode(there, 'A', 'voltage clamp', resistance / 100)]) {
          const rungs = plan.protocol.ladders[0]?.rungs;
          expect(rungs !== undefined && 'increment' in rungs ? rungs.increment : 0).not.toBe(0);
        }
      }),
    );
  });
});

describe('changes of the ladder', () => {
  it('move one end and leave the other where it was, within one rung', () => {
    fc.assert(
      fc.property(fc.integer({ min: -200, max: 30 }), (first) => {
        const main = mainLadder(withFirstRung(start, first));
        expect(main?.first).toBe(first);
        expect(Math.abs((main?.last ?? NaN) - 40)).toBeLessThan(10);
      }),
    );
  });

  it('turn round when the last rung goes past the first', () => {
    expect(mainLadder(withLastRung(start, -120))).toMatchObject({ first: -100, last: -120, count: 3, increment: -10 });
  });

  it('turn round when the first rung goes past the last', () => {
    expect(mainLadder(withFirstRung(start, 100))).toMatchObject({ first: 100, last: 40, count: 7, increment: -10 });
  });

  it('count sweeps', () => {
    expect(mainLadder(withRungCount(start, 3))).toMatchObject({ first: -100, last: -80, count: 3 });
  });
});

describe('a new plan', () => {
  it('asks for the late steady current of a passive cell, and for the peak once there are gates', () => {
    expect(start.question?.reading).toBe('steady');
    const gated = withMakeUp(start, 'soma', (m) => ({
      ...m,
      channels: [{ channel: 'na-hodgkin-huxley-1952', density: { rule: 'uniform', mS_cm2: 120 } }] as never,
    })).cell;
    expect(firstPlan(gated).question?.reading).toBe('peak');
  });
});

describe('changes of the cell', () => {
  it('keep a make-up for every region', () => {
    const cut = withRegionCut(start, 'apical', 100);
    isWhole(cut);
    const regions = 'shape' in cut.cell ? cut.cell.regions.map((r) => r.name) : [];
    expect(regions).toContain('apical, far');
    const renamed = withRegion(cut, 'apical, far', { name: 'tuft' });
    const made = 'shape' in renamed.cell ? renamed.cell.makeUp.map((m) => m.region) : [];
    expect(made).toContain('tuft');
    expect(withoutRegion(renamed, 'tuft').cell).toMatchObject({ makeUp: { length: 4 } });
  });

  it('change only the region they name', () => {
    const changed = withMakeUp(start, 'apical', (m) => ({ ...m, spineFactor: 1.9 }));
    const factors = 'shape' in changed.cell ? changed.cell.makeUp.map((m) => m.spineFactor) : [];
    expect(factors).toEqual([1, 1, 1, 1.9]);
  });
});
