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

  it('switching A to current clamp gives pA that make the same steps through the input resistance', () => {
    const plan = withMode(start, 'A', 'current clamp', 100);
    isWhole(plan);
    // Holding −70 mV becomes 0 pA; a rung of 10 mV through 100 MΩ is 100 pA; −100 mV is 30 mV below holding.
    expect(plan.protocol.lanes[0]).toMatchObject({ unit: 'pA', holding: 0 });
    expect(plan.protocol.ladders[0]?.rungs).toEqual({ start: -300, increment: 100, count: 15 });
  });

  it('there and back leads to the same levels when the resistance is round', () => {
    const back = withMode(withMode(start, 'A', 'current clamp', 100), 'A', 'voltage clamp', 100);
    expect(back.protocol).toEqual(start.protocol);
  });

  it('never makes a ladder whose rungs are all the same', () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 1e5, noNaN: true }), (resistance) => {
        const rungs = withMode(start, 'A', 'current clamp', resistance).protocol.ladders[0]?.rungs;
        expect(rungs !== undefined && 'increment' in rungs ? rungs.increment : 0).not.toBe(0);
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

  it('count sweeps', () => {
    expect(mainLadder(withRungCount(start, 3))).toMatchObject({ first: -100, last: -80, count: 3 });
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
