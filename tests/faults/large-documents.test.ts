// Documents that ask for too much: refused in a moment, with the limit and what to do, before any memory is taken.
import { describe, expect, it } from 'vitest';
import type { Rate } from '../../src-main/contract/documents.ts';
import { checkedQuestion } from '../../src-main/engine/question.ts';
import { readDocument, readPlanFile } from '../../src-main/exchange/documents.ts';
import { refusalsOf } from '../support/refusals.ts';
import { smallPlan } from '../support/small-plans.ts';

const plan = smallPlan();

/** The plan with one gate whose opening rate is nested so deep. */
function withNested(levels: number): unknown {
  let rate: Rate = { kind: 'const', value: 1 };
  for (let level = 0; level < levels; level += 1) rate = { kind: 'reciprocal', of: rate };
  const gates = [{ name: 'm', power: 1, alpha: rate, beta: { kind: 'const', value: 1 } }];
  return { ...plan, cell: { ...plan.cell, channels: [{ name: 'leak', reversal_mV: -68, gates }] } };
}

describe('a document that is nested too deep', () => {
  // 5000 levels are beyond what a schema can follow, 10⁶ beyond any recursion; 20 are more than any formula needs.
  it.each([100, 5000, 1_000_000])('is refused with the place: %i levels', (levels) => {
    const [refusal, ...others] = refusalsOf(() => checkedQuestion('plan check', { plan: withNested(levels) }));
    expect(others).toEqual([]);
    expect(refusal).toMatchObject({ code: 'too-large', value: 'more than 100 levels deep' });
    expect(refusal?.place).toMatch(/^plan\.cell\.channels\[0\]\.gates\[0\]\.alpha\.of\.of\..* \.\.\.$/);
  });

  it('is refused when it comes as a file', () => {
    const lists = '['.repeat(100_000) + ']'.repeat(100_000);
    const text = JSON.stringify(plan).replace('"note":"Made up for tests."', `"note":${lists}`);
    const [refusal] = refusalsOf(() => readPlanFile(text, 'deep.plan.json'));
    expect(refusal).toMatchObject({ code: 'too-large', thing: 'nesting of the document' });
    expect(refusal?.place).toMatch(/^deep\.plan\.json: cell\.note\[0\]\[0\]/);
  });

  it('is read while it is not', () => {
    const document = readDocument(JSON.stringify(withNested(20)), '', 'plan');
    expect(checkedQuestion('plan check', { plan: document }).plan).toEqual(document);
  });
});
