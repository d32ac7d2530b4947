// Documents that ask for too much: refused in a moment, with the limit and what to do, before any memory is taken.
import { truncateSync, writeFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import type { Block, PlanDocument, Rate } from '../../src-main/contract/documents.ts';
import { checkedQuestion } from '../../src-main/engine/question.ts';
import { readPlanWhole } from '../../src-main/engine/read-plan.ts';
import { readSwcFile } from '../../src-main/engine/swc-file.ts';
import { checkPlan } from '../../src-main/engine/work/check.ts';
import { readDocument, readPlanFile } from '../../src-main/exchange/documents.ts';
import { testFolder } from '../support/folder.ts';
import { refusalsOf } from '../support/refusals.ts';
import { smallPlan } from '../support/small-plans.ts';

const at = testFolder();
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

describe('a protocol that is too large', () => {
  const { protocol } = plan;
  const hold = (duration_ms: number): Block => ({ kind: 'hold', id: 'long', duration_ms });
  const train = (id: string): Block => ({
    kind: 'pulse train',
    id,
    duration_ms: 1000,
    level: 0,
    base: -70,
    width_ms: 0.005,
    rate_Hz: 100_000,
    count: 100_000,
  });
  const withBlocks = (blocks: Block[], changes: Partial<PlanDocument['protocol']> = {}): PlanDocument => ({
    ...plan,
    protocol: {
      ...protocol,
      ladders: [],
      readings: [],
      sweepInterval_ms: 1e9,
      ...changes,
      lanes: [{ pipette: 'A', unit: 'mV', holding: -70, blocks }],
    },
  });
  const rungs = (count: number) => [
    { lane: 'A', block: 'long', number: 'duration_ms', rungs: { start: 10, increment: 0, count } } as const,
  ];
  const many = (count: number, block: (id: string) => Block) =>
    Array.from({ length: count }, (_, i) => block(`b-${i}`));

  it.each<[string, PlanDocument, string, string]>([
    [
      'a sweep of 10⁹ samples',
      withBlocks([hold(50e6)]),
      'protocol.sampling_us',
      '1000000001 samples in one sweep, at most 50000000',
    ],
    [
      'sweeps of 10⁹ samples together',
      withBlocks([hold(50e3)], { repeats: 1000 }),
      'protocol',
      '1000001000 samples in all sweeps, at most 100000000',
    ],
    [
      'more traces than can be kept',
      {
        ...withBlocks([hold(50e3)], { repeats: 90 }),
        probes: ['x', 'y'].map((name) => ({ name, site: { compartment: 'far' } })),
      },
      'plan',
      '90000090 samples in all sweeps, in 5 traces: more than 400000000 numbers',
    ],
    [
      '10⁶ sweeps',
      withBlocks([hold(10)], { repeats: 1000, ladders: rungs(1000) }),
      'protocol',
      '1000000 sweeps, at most 10000',
    ],
    [
      'a ladder of many rungs over many blocks',
      withBlocks([hold(10), ...many(999, (id) => ({ kind: 'step', id, duration_ms: 1, level: 0 }))], {
        ladders: rungs(10_000),
      }),
      'protocol',
      '10000000 blocks in all sweeps, at most 2000000',
    ],
    [
      'trains of 10⁸ pulses',
      withBlocks(many(1000, train), { sampling_us: 100 }),
      'protocol.lanes',
      '100000000 pulses in one sweep, at most 1000000',
    ],
  ])('is refused with its size and the limit: %s', (_, asked, place, value) => {
    const [refusal, ...others] = checkPlan({ plan: asked }).refusals;
    expect(others).toEqual([]);
    expect(refusal).toMatchObject({ code: 'too-large', place, value });
  });

  it.each<[string, object, string]>([
    ['counted', { start: 0, increment: 1, count: 1_000_000 }, 'protocol.ladders[0].rungs.count'],
    ['listed', { list: Array<number>(1_000_000).fill(0) }, 'protocol.ladders[0].rungs.list'],
  ])('is refused where a ladder has 10⁶ rungs, %s', (_, given, place) => {
    const asked = { ...plan, protocol: { ...protocol, ladders: [{ ...protocol.ladders[0], rungs: given }] } };
    const [refusal, ...others] = refusalsOf(() => checkedQuestion('plan check', { plan: asked }));
    expect(others).toEqual([]);
    expect(refusal).toMatchObject({ place, remedy: expect.stringContaining('at most 10000') });
  });

  it('is refused where there are 10⁵ ladders or readings', () => {
    const asked = {
      ...plan,
      protocol: {
        ...protocol,
        ladders: Array<unknown>(100_000).fill(protocol.ladders[0]),
        readings: Array<unknown>(100_000).fill(protocol.readings[0]),
      },
    };
    const refused = refusalsOf(() => checkedQuestion('plan check', { plan: asked }));
    expect(refused.map(({ code, place, remedy }) => `${code} ${place}: ${remedy}`)).toEqual([
      'too-large protocol.ladders: give at most 64 of them',
      'too-large protocol.readings: give at most 64 of them',
    ]);
  });

  it('is laid out while it is within the limits', () => {
    // A tenth of the most blocks, and as many readings as there may be: every window is looked at in every rung.
    const blocks = [hold(10), ...many(199, (id) => ({ kind: 'step', id, duration_ms: 0.01, level: 0 }))];
    const reading = (i: number) => ({
      id: `r-${i}`,
      name: 'r',
      pipette: 'A' as const,
      measure: 'mean' as const,
      direction: 'largest' as const,
      window: {
        lane: 'A' as const,
        from: { block: 'long', edge: 'start' as const, offset_ms: 0 },
        to: { block: 'b-198', edge: 'end' as const, offset_ms: 0 },
      },
    });
    const readings = Array.from({ length: 64 }, (_, i) => reading(i));
    const found = checkPlan({ plan: withBlocks(blocks, { ladders: rungs(1000), readings }) });
    expect(found).toMatchObject({ refusals: [], sweeps: 1000 });
  });
});

it('a cell of 10⁵ channels of its own is refused', () => {
  const channels = Array.from({ length: 100_000 }, (_, n) => ({ name: `c-${n}`, reversal_mV: 0, gates: [] }));
  const asked = { ...plan, cell: { ...plan.cell, channels } };
  expect(refusalsOf(() => checkedQuestion('plan check', { plan: asked }))).toEqual([
    expect.objectContaining({ code: 'too-large', place: 'cell.channels', remedy: 'give at most 100 of them' }),
  ]);
});

it('tells each of 200 000 faults', () => {
  if (!('compartments' in plan.cell)) throw new Error('the small plan is a sketch');
  const couplings = Array.from({ length: 200_000 }, (_, n): [string, string, number] => ['soma', `nowhere ${n}`, 1]);
  const { refusals } = checkPlan({ plan: { ...plan, cell: { ...plan.cell, couplings_nS: couplings } } });
  expect(refusals).toHaveLength(200_000);
  expect(refusals.at(-1)).toMatchObject({ code: 'name-unknown', place: 'cell.couplings_nS[199999][1]' });
});

describe('a file that is too large, or no file', () => {
  const shaped = {
    kind: 'cell',
    format: 1,
    name: 'Shaped',
    surroundings: { temperature_C: 22 },
    shape: { kind: 'swc', file: 'big.swc' },
    regions: [{ name: 'all', swcTypes: [1] }],
    makeUp: [
      {
        region: 'all',
        capacitance_uF_cm2: 1,
        axialResistivity_Ohm_cm: 100,
        leak: { conductance_mS_cm2: 0.1, reversal_mV: -70 },
      },
    ],
  };
  /** A file with a hole of so many bytes, which takes no place on the disk. */
  function fileOf(name: string, bytes: number): string {
    writeFileSync(at(name), '');
    truncateSync(at(name), bytes);
    return at(name);
  }

  it('is refused by its size: an SWC file of 200 MB, by itself and beside a plan', () => {
    const big = { code: 'too-large', place: fileOf('big.swc', 200e6), value: '200 MB' };
    expect(refusalsOf(() => readSwcFile(at('big.swc')))).toEqual([expect.objectContaining(big)]);
    writeFileSync(at('a.plan.json'), JSON.stringify({ ...plan, cell: shaped }));
    expect(refusalsOf(() => readPlanWhole(at('a.plan.json')))).toEqual([
      expect.objectContaining({ ...big, remedy: 'give a file of at most 100 MB' }),
    ]);
  });

  it('is refused where the plan holds an SWC text of 200 MB', () => {
    const cell = { ...shaped, shape: { kind: 'swc', text: ' '.repeat(200e6) } };
    const [refusal, ...others] = refusalsOf(() => checkedQuestion('plan check', { plan: { ...plan, cell } }));
    expect(others).toEqual([]);
    expect(refusal).toMatchObject({ code: 'too-large', place: 'cell.shape.text' });
  });

  it('is refused by its size: a plan of 4 GB', () => {
    expect(refusalsOf(() => readPlanWhole(fileOf('a.plan.json', 4e9)))).toEqual([
      expect.objectContaining({ code: 'too-large', value: '4000 MB', remedy: 'give a file of at most 200 MB' }),
    ]);
  });

  it.runIf(process.platform === 'linux')('is refused where it is a device that never ends', () => {
    for (const read of [readSwcFile, readPlanWhole])
      expect(refusalsOf(() => read('/dev/zero'))[0]).toMatchObject({ code: 'file-unreadable', value: 'no file' });
  });
});
