// Writing SWC and reading it back: the same measures.
import { readdirSync, readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { generatedSwc } from '../../src-main/cell/generators.ts';
import { shapeOfReading } from '../../src-main/cell/shape.ts';
import { readSwc } from '../../src-main/cell/swc-read.ts';
import type { SwcMeasures } from '../../src-main/contract/results.ts';
import { swcOfReading, swcOfShape } from '../../src-main/exchange/swc-export.ts';
import { readText } from '../support/shape-cells.ts';
import { randomSwc } from '../support/swc-random.ts';

const folder = new URL('../support/swc-cases/', import.meta.url);
const readable = readdirSync(folder)
  .filter((name) => name.endsWith('.swc') && Number(name.slice(0, 2)) < 40)
  .map((name) => [name] as const);

/** Six decimals of a micrometre, in samples some micrometres apart. */
const rounding = 1e-5;

function expectSame(found: SwcMeasures, wanted: SwcMeasures, but: readonly (keyof SwcMeasures)[] = []): void {
  for (const [name, value] of Object.entries(wanted)) {
    if (but.includes(name as keyof SwcMeasures)) continue;
    const other = found[name as keyof SwcMeasures];
    if (typeof value === 'number')
      expect(Math.abs(Number(other) - value), name).toBeLessThanOrEqual(rounding * Math.abs(value));
    else expect(other, name).toBe(value);
  }
}

describe('SWC written by Holdfast', () => {
  it.each(readable)('%s measures the same when written out and read back', (name) => {
    const reading = readSwc(readFileSync(new URL(name, folder)));
    if (reading.kind === 'refused') throw new Error(reading.code);
    const text = swcOfReading(reading, name);

    expectSame(readText(text).report.measures!, reading.report.measures!);
  });

  it('has ids 1 to n, parents first, single blanks, LF, plain decimals and a header that names the program', () => {
    const reading = readSwc(readFileSync(new URL('17_children_before_parents.swc', folder)));
    if (reading.kind === 'refused') throw new Error(reading.code);
    const lines = swcOfReading(reading, 'turned').split('\n');

    expect(lines.slice(0, 2)).toEqual([
      '# turned',
      '# Written by Holdfast: id type x y z radius parent, in micrometres',
    ]);
    const rows = lines.slice(2, -1);
    expect(lines.at(-1)).toBe('');
    rows.forEach((row, n) => {
      expect(row).toMatch(/^\d+ \d+( -?\d+(\.\d{1,6})?){4} (-1|\d+)$/);
      const columns = row.split(' ');
      expect(columns[0]).toBe(String(n + 1));
      expect(Number(columns[6])).toBeLessThan(n + 1);
    });
  });

  it('a shape of any cell measures the same when written out and read back', () => {
    fc.assert(
      fc.property(randomSwc, (rows) => {
        const reading = readText(rows.join('\n'));
        const again = readText(swcOfShape(shapeOfReading(reading), 'random'));

        expectSame(again.report.measures!, reading.report.measures!);
      }),
    );
  });

  it.each(['03_cylinder_stack_soma.swc', '05_no_soma.swc', '07_trifurcation.swc', '23_repeated_points.swc'])(
    'the shape of %s keeps soma, branches and membrane',
    (name) => {
      const reading = readSwc(readFileSync(new URL(name, folder)));
      if (reading.kind === 'refused') throw new Error(reading.code);
      const again = readText(swcOfShape(shapeOfReading(reading), name));

      // A shape leaves out samples that repeat a tip.
      expectSame(again.report.measures!, reading.report.measures!, ['samples', 'main_tree_samples']);
    },
  );

  it.each(['layer-5-like pyramidal', 'fast interneuron', 'granule-like'] as const)(
    'a generated %s cell keeps it all',
    (cellType) => {
      const reading = readText(generatedSwc({ kind: 'tree', cellType, seed: 9, size: 1 }));

      expectSame(readText(swcOfShape(shapeOfReading(reading), cellType)).report.measures!, reading.report.measures!);
    },
  );
});
