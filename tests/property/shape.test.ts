// Branches of a shape: numbered from the soma, parents first, and where each hangs.
import { describe, expect, it } from 'vitest';
import { cutGrid } from '../../src-main/cell/cut.ts';
import { drawCell } from '../../src-main/cell/drawing.ts';
import { shapeOf } from '../../src-main/cell/shape.ts';
import { passiveCell, swcShape, total } from '../support/shape-cells.ts';

const numbers = { Rm_kOhm_cm2: 20, Ri_Ohm_cm: 100, Cm_uF_cm2: 1 };
const forked = swcShape(
  '1 1 0 0 0 10 -1\n2 3 10 0 0 1 1\n3 3 60 0 0 1 2\n4 3 90 40 0 1 3\n5 4 90 -40 0 1 3\n6 2 0 -10 0 0.5 1\n7 2 0 -90 0 0.5 6\n',
);

describe('shape', () => {
  it('numbers the soma 0 and then branches depth first, in the order of the file', () => {
    const { branches } = shapeOf(forked);

    expect(branches.map(({ branch, parent }) => [branch, parent])).toEqual([
      [0, -1],
      [1, 0],
      [2, 1],
      [3, 1],
      [4, 0],
    ]);
    expect(branches.map((branch) => Math.round(branch.at.at(-1)! * 1e6))).toEqual([0, 50, 50, 50, 80]);
    expect(branches.map((branch) => Math.round(branch.startDistance * 1e6))).toEqual([0, 0, 50, 50, 0]);
    expect(branches.map((branch) => branch.type.at(-1))).toEqual([1, 3, 3, 4, 2]);
  });

  it('starts a fork’s children at the fork and a stem at its first sample', () => {
    const { branches } = shapeOf(forked);

    expect([...branches[2]!.xyz.subarray(0, 3)].map((x) => Math.round(x * 1e6))).toEqual([60, 0, 0]);
    expect([...branches[1]!.xyz.subarray(0, 3)].map((x) => Math.round(x * 1e6))).toEqual([10, 0, 0]);
  });

  it('takes a stack whose root lies in its middle as one branch from end to end', () => {
    const shape = shapeOf(
      swcShape('1 1 0 0 0 6 -1\n2 1 0 0 -8 2 1\n3 1 0 0 5 4 1\n4 1 0 0 9 2 3\n5 3 6 0 0 1 1\n6 3 66 0 0 1 5\n'),
    );
    const grid = cutGrid(
      passiveCell(
        swcShape('1 1 0 0 0 6 -1\n2 1 0 0 -8 2 1\n3 1 0 0 5 4 1\n4 1 0 0 9 2 3\n5 3 6 0 0 1 1\n6 3 66 0 0 1 5\n'),
        numbers,
      ),
      [],
    );

    expect(shape.soma?.kind).toBe('stack');
    expect(shape.branches).toHaveLength(2);
    expect([...shape.branches[0]!.at].map((x) => Math.round(x * 1e6))).toEqual([0, 8, 13, 17]);
    expect(shape.branches[1]?.parentAt).toBeCloseTo(8e-6, 12);
    // The stem's parent compartment sits where the stem hangs.
    const stem = grid.branch.indexOf(1);
    expect(grid.at[grid.parent[stem]!]).toBeCloseTo(8e-6, 12);
    expect(grid.distance[grid.parent[stem]!]).toBe(0);
  });

  it('hangs several neurites of a cell without soma on the root', () => {
    const { soma, branches } = shapeOf(swcShape('1 3 0 0 0 1 -1\n2 3 50 0 0 1 1\n3 3 0 50 0 1 1\n4 3 0 0 50 1 1\n'));

    expect(soma).toBeNull();
    expect(branches.map(({ parent, parentAt }) => [parent, parentAt])).toEqual([
      [-1, 0],
      [0, 0],
      [0, 0],
    ]);
  });

  it('takes only the main tree', () => {
    const two = shapeOf(swcShape('1 2 900 0 0 1 -1\n2 2 990 0 0 1 1\n3 1 0 0 0 8 -1\n4 3 8 0 0 1 3\n5 3 80 0 0 1 4\n'));

    expect(two.branches).toHaveLength(2);
    expect(two.report.codes).toEqual(['W_TREES']);
  });

  it('refuses a lone sample that is no soma, and a file nobody has read', () => {
    const refusal = expect.objectContaining({ data: expect.objectContaining({ code: 'swc-refused' }) });

    expect(() => shapeOf(swcShape('1 3 0 0 0 1 -1\n'))).toThrow(refusal);
    expect(() => shapeOf({ kind: 'swc', file: 'a.swc' })).toThrow(refusal);
  });
});

describe('drawing', () => {
  it('gives each branch its number, region and polyline, and the sizes of regions', () => {
    const cell = passiveCell(forked, numbers);
    const grid = cutGrid(cell, []);
    const drawing = drawCell(cell, grid);

    expect(drawing.branches.map(({ branch, parent }) => [branch, parent])).toEqual(
      shapeOf(forked).branches.map(({ branch, parent }) => [branch, parent]),
    );
    expect(drawing.soma).toEqual({ xyz_um: [0, 0, 0], radius_um: expect.closeTo(10, 9) });
    expect(drawing.totalArea_um2).toBeCloseTo(400 * Math.PI + 300 * Math.PI + 80 * Math.PI, 6);
    expect(drawing.regions).toEqual([
      { name: 'all', area_um2: expect.closeTo(drawing.totalArea_um2, 6), length_um: expect.closeTo(230, 6) },
    ]);
    expect(drawing.totalCapacitance_pF).toBeCloseTo(drawing.totalArea_um2 / 100, 6);
    expect(total(drawing.compartments.area_um2)).toBeCloseTo(drawing.totalArea_um2, 6);
    expect(drawing.swcReport?.outcome).toBe('accept');
  });
});
