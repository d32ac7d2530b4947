// Generated cells: the same for the same seed, readable without a complaint, in the proportions they claim.
import { readdirSync, readFileSync } from 'node:fs';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cutGrid } from '../../src-main/cell/cut.ts';
import { generatedSwc } from '../../src-main/cell/generators.ts';
import type { SwcRead } from '../../src-main/cell/swc-read.ts';
import { cellSchema, type Generator } from '../../src-main/contract/documents.ts';
import { exampleShapes } from '../../scripts/example-shapes.ts';
import { readText, steadyVoltages, total } from '../support/shape-cells.ts';

type CellType = Extract<Generator, { kind: 'tree' }>['cellType'];
const grown = (cellType: CellType, seed: number) => readText(generatedSwc({ kind: 'tree', cellType, seed, size: 1 }));
const seed = fc.integer({ min: 0, max: 4294967295 });
const types: CellType[] = ['layer-5-like pyramidal', 'fast interneuron', 'granule-like', 'round'];

/** Length of neurites of one SWC type, µm. */
function lengthOf({ samples }: SwcRead, type: number): number {
  return total(
    samples.map((s) => {
      const parent = samples[s.parent];
      if (parent === undefined || parent.soma || s.type !== type) return 0;
      return Math.hypot(s.x - parent.x, s.y - parent.y, s.z - parent.z);
    }),
  );
}

describe('generated cells', () => {
  it.each(types)('a %s cell reads without a finding, at any seed', (cellType) => {
    fc.assert(
      fc.property(seed, (n) => {
        const reading = grown(cellType, n);
        expect(reading.report.codes).toEqual([]);
        // No dendrite is thinner than 0.4 µm.
        expect(Math.min(...reading.samples.map((s) => s.radius))).toBeGreaterThanOrEqual(0.2);
      }),
      { numRuns: 25 },
    );
  });

  it('says in its header that it is invented, by which program and from which seed', () => {
    const { header } = grown('granule-like', 77).report;

    expect(header.join(' ')).toMatch(/Holdfast generator.*seed 77.*Invented/);
  });

  it('is the same for the same seed and another for another', () => {
    const text = (n: number) => generatedSwc({ kind: 'tree', cellType: 'fast interneuron', seed: n, size: 1 });

    expect(text(3)).toBe(text(3));
    expect(text(3)).not.toBe(text(4));
  });

  it('a pyramidal cell has 8 to 12 mm of dendrites, 6 to 8 basal trees and an apical tree up to its tuft', () => {
    fc.assert(
      fc.property(seed, (n) => {
        const reading = grown('layer-5-like pyramidal', n);
        const dendrites = lengthOf(reading, 3) + lengthOf(reading, 4);
        const top = Math.max(...reading.samples.filter((s) => s.type === 4).map((s) => s.y));
        // Stems: one apical, one axon, the rest basal.
        const basal = reading.report.measures!.stem_count - 2;

        expect(dendrites).toBeGreaterThan(7999);
        expect(dendrites).toBeLessThan(12_001);
        expect(basal).toBeGreaterThanOrEqual(6);
        expect(basal).toBeLessThanOrEqual(8);
        expect(top).toBeGreaterThan(700);
        expect(top).toBeLessThan(1150);
      }),
      { numRuns: 25 },
    );
  });

  it('a fast interneuron has 3 to 5 mm of dendrites to all sides, a granule-like cell a cone of 250 to 350 µm', () => {
    fc.assert(
      fc.property(seed, (n) => {
        const interneuron = lengthOf(grown('fast interneuron', n), 3);
        const dendrites = grown('granule-like', n).samples.filter((s) => s.type === 3);
        const top = Math.max(...dendrites.map((s) => s.y));

        expect(interneuron).toBeGreaterThan(2999);
        expect(interneuron).toBeLessThan(5001);
        expect(top).toBeGreaterThan(230);
        expect(top).toBeLessThan(380);
        expect(Math.min(...dendrites.map((s) => s.y))).toBeGreaterThan(0);
      }),
      { numRuns: 25 },
    );
  });

  it('scales every length and diameter with size', () => {
    const adult = grown('granule-like', 5).report.measures!;
    const half = readText(generatedSwc({ kind: 'tree', cellType: 'granule-like', seed: 5, size: 0.5 })).report
      .measures!;

    // Coordinates are written to a thousandth of a micrometre.
    expect(half.neurite_length_um / adult.neurite_length_um).toBeCloseTo(0.5, 3);
    expect(half.neurite_area_um2 / adult.neurite_area_um2).toBeCloseTo(0.25, 3);
  });
});

// Ranges: common practice for each kind of cell, adult, h-current active.
const examples = [
  { file: 'layer-5-like-pyramidal', name: 'Layer-5-like pyramidal', R: [20, 60], tau: [10, 20] },
  { file: 'fast-interneuron', name: 'Fast interneuron', R: [70, 150], tau: [8, 10] },
  { file: 'granule-like-cell', name: 'Granule-like cell', R: [120, 300], tau: [15, 34] },
  { file: 'round-cell', name: 'Round cell', R: [1400, 5000], tau: [10, 30] },
] as const;

describe('example cells', () => {
  const folder = new URL('../../assets/examples/cells/', import.meta.url);
  const text = (name: string) => readFileSync(new URL(name, folder), 'utf8');

  it('have shapes exactly as the generators make them', () => {
    const stored = readdirSync(folder).filter((name) => name.endsWith('.swc'));

    expect(stored.sort()).toEqual(
      Object.keys(exampleShapes)
        .map((name) => `${name}.swc`)
        .sort(),
    );
    for (const [name, generator] of Object.entries(exampleShapes))
      expect(text(`${name}.swc`)).toBe(generatedSwc(generator));
  });

  it.each(examples)(
    '$name is a cell document in the passive range of its kind, and says it is invented',
    ({ file, name, R, tau }) => {
      const document: unknown = JSON.parse(text(`${file}.cell.json`));
      const cell = cellSchema.parse({ ...(document as object), shape: { kind: 'swc', text: text(`${file}.swc`) } });
      const grid = cutGrid(cell, []);
      const [leak] = grid.conductances;
      const input = steadyVoltages({ ...grid, conductances: [leak!] }, 0)[0]! / 1e6;
      const timeConstant = (total(grid.capacitance) / total(leak!.conductance)) * 1e3;

      expect((document as { shape: unknown }).shape).toEqual({ kind: 'swc', file: `${file}.swc` });
      expect(cell.name).toBe(name);
      expect(cell.note).toContain('Invented for the demo');
      expect(leak?.channel).toBe('leak');
      expect(input).toBeGreaterThan(R[0]);
      expect(input).toBeLessThan(R[1]);
      expect(timeConstant).toBeGreaterThan(tau[0]);
      expect(timeConstant).toBeLessThan(tau[1]);
      expect(grid.conductances.map(({ channel }) => channel)).toEqual([
        'leak',
        'na-hodgkin-huxley-1952',
        'k-hodgkin-huxley-1952',
      ]);
    },
  );
});
