// Reading documents: every fault at once, each with its path, its value as given and what to do about it.
import { describe, expect, it } from 'vitest';
import { readDocument, readPlanFile, wholePlan } from '../../src-main/exchange/documents.ts';
import { jsonFault } from '../../src-main/exchange/json-fault.ts';
import { refusalsOf } from '../support/refusals.ts';
import { smallPlan } from '../support/small-plans.ts';

const plan = smallPlan();
const text = (value: unknown) => JSON.stringify(value);

describe('reading a document', () => {
  it('gives back what was written', () => {
    expect(readDocument(text(plan), 'a.plan.json', 'plan')).toEqual(plan);
    expect(readDocument(text(plan.rig), '')).toEqual(plan.rig);
    expect(readDocument(`\ufeff${text(plan.cell)}`, '', 'cell')).toEqual(plan.cell);
  });

  it('lists every fault with path, value with unit, and remedy', () => {
    const rig = {
      ...plan.rig,
      colour: 'blue',
      pipettes: [{ ...plan.rig.pipettes[0], accessResistance_MOhm: -3, mode: 'dreaming', letter: undefined }],
    };
    expect(refusalsOf(() => readDocument(text(rig), 'my.rig.json'))).toEqual([
      {
        code: 'document-field-missing',
        thing: 'letter',
        place: 'my.rig.json: pipettes[0].letter',
        value: 'missing',
        remedy: 'give one of "A", "B"',
      },
      {
        code: 'document-wrong-type',
        thing: 'mode',
        place: 'my.rig.json: pipettes[0].mode',
        value: '"dreaming"',
        remedy: 'give one of "voltage clamp", "current clamp"',
      },
      {
        code: 'quantity-out-of-range',
        thing: 'access resistance',
        place: 'my.rig.json: pipettes[0].accessResistance_MOhm',
        value: '-3 MΩ',
        remedy: 'give a value of at least 0',
      },
      {
        code: 'document-unknown-field',
        thing: 'field "colour"',
        place: 'my.rig.json: colour',
        value: '"blue"',
        remedy: 'remove it, or correct its name',
      },
    ]);
  });

  it('speaks of the kind of cell that was meant', () => {
    const cell = { ...plan.cell, couplings_nS: [['soma', 'near', -5]] };
    const found = refusalsOf(() => readDocument(text(cell), ''));
    expect(found.map(({ code, place, value }) => [code, place, value])).toEqual([
      ['quantity-out-of-range', 'couplings_nS[0][2]', '-5 nS'],
    ]);
  });

  it('speaks of the block that was meant, and names the kinds there are', () => {
    const [lane] = plan.protocol.lanes;
    const protocol = { ...plan.protocol, lanes: [{ ...lane, blocks: [{ kind: 'wobble', id: 'a', duration_ms: 1 }] }] };
    expect(refusalsOf(() => readDocument(text(protocol), ''))).toEqual([
      expect.objectContaining({
        code: 'document-wrong-kind',
        place: 'lanes[0].blocks[0].kind',
        remedy: 'give one of "hold", "step", "ramp", "pulse train"',
      }),
    ]);
  });

  it('refuses numbers that are not finite', () => {
    const huge = text(plan.cell).replace('"area_um2":1000', '"area_um2":1e999');
    expect(refusalsOf(() => readDocument(huge, ''))[0]).toMatchObject({
      code: 'quantity-out-of-range',
      place: 'compartments[0].area_um2',
      value: 'Infinity µm²',
    });
  });

  it('refuses a newer format before anything else, also in a part', () => {
    const rig = { ...plan.rig, format: 2, novelty: true };
    expect(refusalsOf(() => readDocument(text(rig), ''))).toEqual([
      expect.objectContaining({ code: 'document-newer-than-app', place: 'format', value: '2' }),
    ]);
    const found = refusalsOf(() => readDocument(text({ ...plan, rig }), ''));
    expect(found).toEqual([expect.objectContaining({ code: 'document-newer-than-app', place: 'rig.format' })]);
  });

  it.each([0, undefined, '1'])('refuses format %s', (format) => {
    const [refusal] = refusalsOf(() => readDocument(text({ ...plan.rig, format }), ''));
    expect(refusal).toMatchObject({ place: 'format', remedy: 'give 1' });
  });

  it('refuses another kind than was asked for, and none', () => {
    const [other] = refusalsOf(() => readDocument(text(plan.rig), 'x', 'cell'));
    expect(other).toMatchObject({ code: 'document-wrong-kind', value: '"rig"', remedy: 'give "cell"' });
    expect(refusalsOf(() => readDocument('{}', ''))[0]).toMatchObject({
      code: 'document-field-missing',
      thing: 'kind',
    });
    expect(refusalsOf(() => readDocument('[]', ''))[0]).toMatchObject({ code: 'document-wrong-type', value: 'a list' });
  });
});

describe('text that is not JSON', () => {
  it.each([
    ['{"kind": "rig",\n "name": }', 2, 10, '}'],
    ['{"kind" "rig"}', 1, 9, '"rig"}'],
    ['{"a": 1,}', 1, 9, '}'],
    ['[1, 2', 1, 6, 'the end of the text'],
    ['', 1, 1, 'the end of the text'],
    ["{'a': 1}", 1, 2, "'a':"],
    ['{"a": 01}', 1, 8, '1}'],
    ['{"a": "x\ny"}', 1, 7, '"x'],
    ['{} {}', 1, 4, '{}'],
    ['{"a": NaN}', 1, 7, 'NaN}'],
  ])('is refused where it stops being JSON: %j', (broken, line, column, found) => {
    const [refusal] = refusalsOf(() => readDocument(broken, 'a.json'));
    expect(refusal).toMatchObject({
      code: 'document-not-json',
      place: `a.json, line ${line}, column ${column}`,
      value: found,
    });
  });

  it('is told apart from JSON as the parser of the platform tells it', () => {
    for (const good of ['1', '-0.5e+3', '"\\u00e9\\n"', ' [ ] ', '{"a":{"b":[true,null]}}']) {
      expect(jsonFault(good)).toBeNull();
    }
    for (const bad of ['+1', '.5', '1.', '"\\x"', 'tru', '{a:1}', '[1 2]', '"']) {
      expect(() => JSON.parse(bad) as unknown).toThrow(SyntaxError);
      expect(jsonFault(bad)).not.toBeNull();
    }
  });
});

describe('a plan in a folder', () => {
  const shaped = {
    kind: 'cell',
    format: 1,
    name: 'From a file',
    surroundings: { temperature_C: 22 },
    shape: { kind: 'swc', file: 'shapes/ball.swc' },
    regions: [{ name: 'soma', swcTypes: [1] }],
    makeUp: [
      {
        region: 'soma',
        capacitance_uF_cm2: 1,
        axialResistivity_Ohm_cm: 100,
        leak: { conductance_mS_cm2: 0.1, reversal_mV: -70 },
      },
    ],
  };
  const files = new Map([
    ['parts/cell.json', text(shaped)],
    ['parts/shapes/ball.swc', '1 1 0 0 0 10 -1\n'],
    ['rig.json', text(plan.rig)],
    ['wrong.json', text({ ...plan.rig, pipettes: [] })],
  ]);
  const read = (path: string) => files.get(path) ?? expect.fail(`${path} was asked for`);

  it('takes its parts from their files, and a shape from the file its cell names', () => {
    const file = readPlanFile(
      text({ ...plan, cell: { file: 'parts/cell.json' }, rig: { file: 'rig.json' } }),
      'p.json',
    );
    const whole = wholePlan(file, read);
    expect(whole.rig).toEqual(plan.rig);
    expect(whole.cell).toMatchObject({
      name: 'From a file',
      shape: { kind: 'swc', text: '1 1 0 0 0 10 -1\n', fileName: 'ball.swc' },
    });
  });

  it('names the file a fault is in', () => {
    const file = readPlanFile(text({ ...plan, rig: { file: 'wrong.json' } }), 'p.json');
    expect(refusalsOf(() => wholePlan(file, read))[0]).toMatchObject({
      place: 'wrong.json: pipettes',
      remedy: 'give at least 1 of them',
    });
  });
});
