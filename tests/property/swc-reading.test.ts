// Reading SWC, whatever the file: long chains, limits, what a refusal names, samples that say nothing new.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cutGrid } from '../../src-main/cell/cut.ts';
import { shapeOf } from '../../src-main/cell/shape.ts';
import { Findings } from '../../src-main/cell/swc-findings.ts';
import { readSwc } from '../../src-main/cell/swc-read.ts';
import { mostSamples, readRows } from '../../src-main/cell/swc-rows.ts';
import { passiveCell, readText, swcShape } from '../support/shape-cells.ts';
import { randomSwc, split } from '../support/swc-random.ts';

const bytes = (text: string) => new TextEncoder().encode(text);

describe('reading SWC', () => {
  it('reads, shapes and cuts a chain of 200,000 samples', () => {
    const rows = ['1 1 0 0 0 10 -1'];
    for (let id = 2; id <= 200_000; id += 1)
      rows.push(`${id} 3 ${10 + id / 100} ${id % 2} ${id % 3} ${0.5 + (id % 5) / 10} ${id - 1}`);
    const text = rows.join('\n');
    const { main, report } = readText(text);
    const grid = cutGrid(passiveCell(swcShape(text), { Rm_kOhm_cm2: 20, Ri_Ohm_cm: 100, Cm_uF_cm2: 1 }), []);

    expect(main.order).toHaveLength(200_000);
    expect(report.measures?.branch_count).toBe(1);
    expect(grid.count).toBeGreaterThan(1000);
  });

  it('reads a comb of 100,000 stems on one soma', () => {
    const rows = ['1 1 0 0 0 10 -1'];
    for (let id = 2; id <= 100_000; id += 1) rows.push(`${id} 3 ${10 + (id % 90)} ${id % 97} 5 0.5 1`);

    expect(readText(rows.join('\n')).report.measures?.stem_count).toBe(99_999);
  });

  it('refuses more than 100 MB without reading it', () => {
    const reading = readSwc(new Uint8Array(100_000_001));

    expect(reading.report).toMatchObject({ outcome: 'refuse', codes: ['E_LIMIT'] });
  });

  it('refuses the first sample beyond the limit, which is 2 million, without looking at the rest', () => {
    const text = '# head\n1 1 0 0 0 9 -1\n2 3 9 0 0 1 1\n3 3 19 0 0 1 2\nnot a row';

    expect(mostSamples).toBe(2_000_000);
    expect(() => readRows(text, new Findings(), 2)).toThrow(expect.objectContaining({ code: 'E_LIMIT', line: 4 }));
  });

  it('names line, text of the line and a remedy when it refuses', () => {
    const reading = readSwc(bytes('# head\r\n1 1 0 0 0 10 -1\r\n2 3 10 0 0 1,5 1\r\n'));

    expect(reading).toMatchObject({ kind: 'refused', code: 'E_NUMBER', line: 3, text: '2 3 10 0 0 1,5 1' });
    expect(reading.report.findings[0]).toMatchObject({ code: 'E_NUMBER', count: 1, lines: [3] });
    expect(reading.report.findings[0]?.words).toContain('plain decimal number');
  });

  it('keeps the header as written and applies none of it', () => {
    const { report, samples } = readText('# SCALE 2 2 2\n# SHRINKAGE_CORRECTION 1.5\n1 1 0 0 0 10 -1\n# late\n');

    expect(report.header).toEqual(['# SCALE 2 2 2', '# SHRINKAGE_CORRECTION 1.5']);
    expect(samples[0]?.radius).toBe(10);
  });

  it.each([
    ['ids with signs and leading zeros', '+01 1 0 0 0 10 -1\n002 3 20 0 0 1 1\n3 3 40 0 0 1 +2\n', []],
    [
      'type 5 without any 6 as a type of its own',
      '1 1 0 0 0 9 -1\n2 3 9 0 0 1 1\n3 5 19 0 0 1 2\n4 3 29 0 0 1 3\n5 3 19 9 0 1 3\n',
      ['W_TYPE_OTHER'],
    ],
    ['two somata in one tree', '1 1 0 0 0 9 -1\n2 3 9 0 0 1 1\n3 3 50 0 0 1 2\n4 1 60 0 0 4 3\n', ['W_SOMA_SPLIT']],
    [
      'several roots at once with a foreign root code',
      '1 1 0 0 0 9 -1\n2 3 9 0 0 1 1\n3 3 50 0 0 1 2\n4 2 90 0 0 1 -5\n5 2 95 0 0 1 4\n',
      ['W_ROOT_CODE', 'W_TREES'],
    ],
    ['a stem of one sample', '1 1 0 0 0 9 -1\n2 3 9 0 0 1 1\n3 3 0 9 0 1 1\n4 3 0 40 0 1 3\n', ['W_STEM_POINT']],
    ['big-endian text', null, ['W_UTF16']],
    ['an end-of-file mark of old', '1 1 0 0 0 9 -1\n\u001a', []],
    ['semicolons', '1;1;0;0;0;9;-1\n2; 3; 9; 0; 0; 1; 1\n3;3;50;0;0;1;2\n', ['W_SEPARATOR']],
  ])('reads %s', (_, text, codes) => {
    const words = '1 1 0 0 0 9 -1\n';
    const bigEndian = Uint8Array.from([0xfe, 0xff, ...Array.from(bytes(words)).flatMap((byte) => [0, byte])]);

    expect(readSwc(text === null ? bigEndian : bytes(text)).report.codes).toEqual(codes);
  });

  it.each([
    ['-3 1 0 0 0 9 -1\n', 'E_ID', 1],
    ['1 1 0 0 0 9 -1\n\ufeff# a second file\n', 'E_COLUMNS', 2],
    ['1 1 0 0 0 9 -1\n2 3 1e999 0 0 1 1\n', 'E_NUMBER', 2],
    ['1 1 0 0 0 9 -1\n2 3 1.0D+02 0 0 1 1\n', 'E_NUMBER', 2],
    ['1 1e0 0 0 0 9 -1\n', 'E_INTEGER', 1],
    ['1 1 0 0 0 9 -1\n2 3 9 0 0 0 1\n', 'E_RADIUS', 2],
  ])('refuses %j', (text, code, line) => {
    expect(readSwc(bytes(text))).toMatchObject({ kind: 'refused', code, line });
  });
});

describe('measures', () => {
  const close = (a: number, b: number) => expect(Math.abs(a - b)).toBeLessThanOrEqual(1e-9 * Math.abs(b));

  it('do not change when every cone is cut in two', () => {
    fc.assert(
      fc.property(randomSwc, (rows) => {
        const whole = readText(rows.join('\n')).report.measures!;
        const halved = readText(split(rows).join('\n')).report.measures!;

        close(halved.neurite_length_um, whole.neurite_length_um);
        close(halved.neurite_area_um2, whole.neurite_area_um2);
        expect(halved.branch_count).toBe(whole.branch_count);
        expect(halved.tip_count).toBe(whole.tip_count);
      }),
    );
  });

  it('do not change with the order of the lines', () => {
    fc.assert(
      fc.property(randomSwc, fc.infiniteStream(fc.double({ min: 0, max: 1, noNaN: true })), (rows, dice) => {
        const keyed = rows.map((row) => ({ row, key: dice.next().value as number }));
        const shuffled = keyed.sort((a, b) => a.key - b.key).map(({ row }) => row);
        const first = readText(rows.join('\n')).report.measures!;
        const second = readText(shuffled.join('\n')).report.measures!;

        for (const [name, value] of Object.entries(first)) {
          const found = second[name as keyof typeof second];
          if (typeof value === 'number') close(Number(found), value);
          else expect(found).toBe(value);
        }
      }),
    );
  });
});

it('a shape refuses text that cannot be read, with place, line and text', () => {
  expect(() => shapeOf({ kind: 'swc', text: '1 1 0 0 0 ten -1', fileName: 'a.swc' })).toThrow(
    expect.objectContaining({
      data: {
        code: 'swc-refused',
        thing: 'E_NUMBER',
        place: 'cell.shape, a.swc line 1',
        value: '"1 1 0 0 0 ten -1"',
        remedy: expect.stringContaining('plain decimal'),
      },
    }),
  );
});
