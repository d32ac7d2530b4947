// The plan line: what its sentence says, and that a number typed digit by digit ends where the number typed at once does.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { planSchema, type PlanDocument } from '../../src-main/contract/documents.ts';
import { planSentence, sentenceText, type NumberFragment } from '../../src-renderer/frame/plan-sentence.ts';
import { withMode } from '../../src-renderer/state/edits/pipette.ts';
import { firstPlan } from '../../src-renderer/state/first-plan.ts';
import { begin, gestureStart, present, record, undoWords } from '../../src-renderer/state/history.ts';
import { madeCell } from '../../src-renderer/state/made-cell.ts';

const plan = firstPlan(madeCell('Cell', { kind: 'tree', cellType: 'layer-5-like pyramidal', seed: 1, size: 1 }));
const numbers = (of: PlanDocument): NumberFragment[] => planSentence(of, null).filter((f) => f.kind === 'number');
const numberOf = (of: PlanDocument, key: string): NumberFragment => numbers(of).find((f) => f.key === key)!;

/** What the plan line does while a text is typed into a fragment: every prefix that is a number takes effect. */
function typed(
  of: PlanDocument,
  key: string,
  text: string,
): { readonly plan: PlanDocument; readonly undo: string | null } {
  let history = begin(of);
  for (let end = 1; end <= text.length; end++) {
    const value = Number(text.slice(0, end));
    const now = numberOf(present(history), key);
    if (text.slice(0, end).trim() === '' || !(value >= now.least && value <= now.most)) continue;
    const start = gestureStart(history, key);
    history = record(history, now.change(start, value), now.undoWords(value), key);
  }
  return { plan: present(history), undo: undoWords(history) };
}

describe('a number typed digit by digit', () => {
  it('ends in the plan that the whole number makes of the plan as it stood, for every fragment', () => {
    const keys = numbers(plan).map((f) => f.key);
    expect(keys).toEqual(['access-A', 'holding', 'first', 'last', 'sweeps', 'temperature', 'bias', 'tolerance']);
    fc.assert(
      fc.property(fc.constantFrom(...keys), fc.integer({ min: -300, max: 300 }), (key, value) => {
        const fragment = numberOf(plan, key);
        fc.pre(value >= fragment.least && value <= fragment.most);
        const result = typed(plan, key, String(value)).plan;
        expect(result).toEqual(fragment.change(plan, value));
        expect(planSchema.safeParse(result).success).toBe(true);
      }),
    );
  });

  it('leaves the rungs of −100 to −60 for a last rung of −60, and undo says so', () => {
    const { plan: now, undo } = typed(plan, 'last', '-60');
    expect(now.protocol.ladders[0]?.rungs).toEqual({ start: -100, increment: 10, count: 5 });
    expect(undo).toBe('last rung 40 → −60\u2009mV');
  });

  it('is named in the undo words beside the rung it led to', () => {
    expect(typed(plan, 'last', '-63').undo).toBe('last rung 40 → −60\u2009mV, nearest to −63');
  });
});

describe('the sentence', () => {
  it('names the holding level that the ladder sets out from', () => {
    expect(sentenceText(planSentence(plan, null))).toContain(
      'Hold minus 70\u2009mV, step minus 100…+40\u2009mV in 15 sweeps',
    );
  });

  it('speaks of no tolerance where nothing holds the voltage', () => {
    const current = planSentence(withMode(plan, 'A', 'current clamp', 100), null);
    expect(sentenceText(current)).not.toContain('held within');
    expect(sentenceText(current)).toMatch(/within 5\u2009%\.$/);
  });

  it('parts no stop or comma from what stands before it', () => {
    for (const fragment of planSentence(plan, null)) {
      if (fragment.kind === 'words') expect(fragment.words).not.toMatch(/^[.,]/);
    }
    expect(sentenceText(planSentence(plan, null))).toMatch(/held within 5\u2009mV\.$/);
  });
});
