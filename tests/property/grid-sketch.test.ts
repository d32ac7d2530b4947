// Sketched cells: compartments and couplings as given, one tree, the first compartment its root.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cutGrid } from '../../src-main/cell/cut.ts';
import { drawCell } from '../../src-main/cell/drawing.ts';
import type { SketchedCellDocument } from '../../src-main/contract/documents.ts';
import { refusalsOf } from '../support/refusals.ts';

function sketch(
  names: readonly string[],
  couplings: readonly (readonly [string, string, number])[],
): SketchedCellDocument {
  return {
    kind: 'cell',
    format: 1,
    name: 'sketch',
    note: '',
    surroundings: { temperature_C: 22 },
    channels: [{ name: 'leak', reversal_mV: -70, gates: [] }],
    compartments: names.map((name, n) => ({
      name,
      area_um2: 100 * (n + 1),
      capacitance_uF_cm2: 0.5,
      channels: { leak: 0.1, na: 2 },
    })),
    couplings_nS: couplings.map(([a, b, g]) => [a, b, g]),
  };
}

describe('sketched cells', () => {
  it('turn trade units into SI and keep the channels’ names', () => {
    const grid = cutGrid(sketch(['soma', 'dendrite'], [['dendrite', 'soma', 3]]), []);

    expect(grid.names).toEqual(['soma', 'dendrite']);
    expect([...grid.parent]).toEqual([-1, 0]);
    expect(grid.coupling[1]).toBeCloseTo(3e-9, 20);
    expect(grid.area[1]).toBeCloseTo(200e-12, 22);
    // 0.5 µF/cm² × 200 µm² = 1 pF; 0.1 mS/cm² × 200 µm² = 0.2 nS.
    expect(grid.capacitance[1]).toBeCloseTo(1e-12, 22);
    const [leak, na] = grid.conductances;
    expect(leak).toMatchObject({ channel: 'leak' });
    expect(leak?.conductance[1]).toBeCloseTo(0.2e-9, 20);
    expect(leak?.reversal[1]).toBeCloseTo(-0.07, 12);
    expect(na?.reversal[0]).toBeNaN();
  });

  it('keep the document’s order where parents stand first, else put it depth first', () => {
    const kept = cutGrid(
      sketch(
        ['a', 'b', 'c', 'd'],
        [
          ['a', 'b', 1],
          ['a', 'c', 1],
          ['b', 'd', 1],
        ],
      ),
      [],
    );
    const turned = cutGrid(
      sketch(
        ['a', 'b', 'c'],
        [
          ['a', 'c', 1],
          ['c', 'b', 2],
        ],
      ),
      [],
    );

    expect(kept.names).toEqual(['a', 'b', 'c', 'd']);
    expect([...kept.parent]).toEqual([-1, 0, 0, 1]);
    expect(turned.names).toEqual(['a', 'c', 'b']);
    expect([...turned.parent]).toEqual([-1, 0, 1]);
    expect(turned.coupling[2]).toBeCloseTo(2e-9, 20);
  });

  it('find sites by name and by their own index, and refuse others', () => {
    const grid = cutGrid(sketch(['a', 'b'], [['a', 'b', 1]]), [{ compartment: 'b' }]);

    expect(grid.compartmentAt({ compartment: 'b' }, 'x')).toBe(1);
    expect(grid.compartmentAt({ branch: 1, at_um: 0 }, 'x')).toBe(1);
    expect(refusalsOf(() => grid.compartmentAt({ compartment: 'c' }, 'rig'))).toMatchObject([
      { code: 'site-off-the-cell', place: 'rig.compartment', value: 'c', remedy: 'name one of: a, b' },
    ]);
    expect(refusalsOf(() => grid.compartmentAt({ branch: 0, at_um: 5 }, 'rig'))).toMatchObject([
      { code: 'site-off-the-cell', value: '5 µm' },
    ]);
  });

  it('refuse a loop, naming the coupling that closes it', () => {
    const looped = sketch(
      ['a', 'b', 'c'],
      [
        ['a', 'b', 1],
        ['b', 'c', 1],
        ['c', 'a', 1],
      ],
    );

    expect(refusalsOf(() => cutGrid(looped, []))).toMatchObject([
      { code: 'couplings-form-a-loop', place: 'cell.couplings_nS[2]', value: 'c to a' },
    ]);
  });

  it.each([
    [
      'the same pair twice',
      [
        ['a', 'b', 1],
        ['b', 'a', 1],
      ] as const,
    ],
    [
      'a compartment with itself',
      [
        ['a', 'a', 1],
        ['a', 'b', 1],
      ] as const,
    ],
  ])('refuse %s as a loop', (_, couplings) => {
    expect(refusalsOf(() => cutGrid(sketch(['a', 'b'], couplings), []))[0]?.code).toBe('couplings-form-a-loop');
  });

  it('refuse parts without a way to the first compartment', () => {
    expect(
      refusalsOf(() =>
        cutGrid(
          sketch(
            ['a', 'b', 'c', 'd'],
            [
              ['a', 'b', 1],
              ['c', 'd', 1],
            ],
          ),
          [],
        ),
      ),
    ).toMatchObject([{ code: 'couplings-leave-parts', value: 'c, d' }]);
  });

  it('refuse names that are unknown or given twice, all at once', () => {
    expect(refusalsOf(() => cutGrid(sketch(['a', 'a'], [['a', 'x', 1]]), []))).toMatchObject([
      { code: 'name-twice', place: 'cell.compartments[1].name', value: 'a' },
      { code: 'name-unknown', place: 'cell.couplings_nS[0][1]', value: 'x' },
    ]);
  });

  it('any random tree in any order becomes rows with parents first and keeps every coupling', () => {
    const trees = fc
      .array(fc.double({ min: 0, max: 0.999, noNaN: true }), { minLength: 1, maxLength: 40 })
      .chain((parents) => {
        const links = parents.map((share, n) => [Math.floor(share * (n + 1)), n + 1] as const);
        return fc.record({
          links: fc.shuffledSubarray(links, { minLength: links.length }),
          names: fc.shuffledSubarray(
            [...parents, 0].map((_, n) => `n${n}`),
            { minLength: parents.length + 1 },
          ),
        });
      });
    fc.assert(
      fc.property(trees, ({ links, names }) => {
        const couplings = links.map(([a, b], n) => [`n${a}`, `n${b}`, n + 1] as const);
        const grid = cutGrid(sketch(names, couplings), []);
        const found = new Set<string>();
        for (let k = 1; k < grid.count; k += 1) {
          expect(grid.parent[k]).toBeLessThan(k);
          const ends = [grid.names![k], grid.names![grid.parent[k]!]].sort();
          found.add(`${ends.join()}:${Math.round(grid.coupling[k]! * 1e9)}`);
        }
        expect(found).toEqual(new Set(couplings.map(([a, b, g]) => `${[a, b].sort().join()}:${g}`)));
        expect(grid.names?.[0]).toBe(names[0]);
      }),
    );
  });

  it('are drawn as a flat tree with no two compartments in one place', () => {
    const cell = sketch(
      ['a', 'b', 'c', 'd', 'e'],
      [
        ['a', 'b', 1],
        ['a', 'c', 1],
        ['c', 'd', 1],
        ['c', 'e', 1],
      ],
    );
    const drawing = drawCell(cell, cutGrid(cell, []));
    const places = drawing.branches.map(({ xyz_um }) => [...xyz_um.subarray(-3)].map(Math.round).join());

    expect(new Set(places).size).toBe(5);
    expect(drawing.branches.map(({ parent }) => parent)).toEqual([-1, 0, 0, 2, 2]);
    expect(drawing.totalArea_um2).toBeCloseTo(1500, 9);
    expect(drawing.swcReport).toBeNull();
  });
});
