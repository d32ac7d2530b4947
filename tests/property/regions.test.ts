// Regions: by SWC type and path distance, the first that fits; cable that none takes is refused.
import { describe, expect, it } from 'vitest';
import { cutGrid } from '../../src-main/cell/cut.ts';
import type { RegionDocument, ShapedCellDocument } from '../../src-main/contract/documents.ts';
import { refusalsOf } from '../support/refusals.ts';
import { passiveCell, swcShape, total } from '../support/shape-cells.ts';

const shape = swcShape('1 1 0 0 0 10 -1\n2 3 10 0 0 1 1\n3 3 110 0 0 1 2\n4 2 0 -10 0 0.5 1\n5 2 0 -110 0 0.5 4\n');
const passive = passiveCell(shape, { Rm_kOhm_cm2: 20, Ri_Ohm_cm: 100, Cm_uF_cm2: 1 });

function withRegions(regions: readonly RegionDocument[]): ShapedCellDocument {
  const makeUp = [...new Set(regions.map(({ name }) => name))].map((region) => ({ ...passive.makeUp[0]!, region }));
  return { ...passive, regions: [...regions], makeUp };
}

describe('regions', () => {
  it('cut cable exactly at their borders', () => {
    const grid = cutGrid(
      withRegions([
        { name: 'soma', swcTypes: [1], from_um: 0 },
        { name: 'near', swcTypes: [2, 3], from_um: 0, to_um: 30.5 },
        { name: 'far', swcTypes: [2, 3], from_um: 30.5 },
      ]),
      [],
    );
    const areas = grid.regionArea.map((area) => total(area) * 1e12);

    expect(areas[0]).toBeCloseTo(400 * Math.PI, 6);
    expect(areas[1]).toBeCloseTo(30.5 * (2 + 1) * Math.PI, 6);
    expect(areas[2]).toBeCloseTo(69.5 * (2 + 1) * Math.PI, 6);
  });

  it('the first that fits wins', () => {
    const grid = cutGrid(
      withRegions([
        { name: 'axon', swcTypes: [2], from_um: 0 },
        { name: 'rest', swcTypes: [1, 2, 3], from_um: 0 },
      ]),
      [],
    );

    expect(total(grid.regionArea[0]!) * 1e12).toBeCloseTo(100 * Math.PI, 6);
    expect(grid.regionNames).toEqual(['axon', 'rest']);
  });

  it('refuses cable that no region takes, by type, with its length and distance', () => {
    const refusals = refusalsOf(() =>
      cutGrid(
        withRegions([
          { name: 'soma', swcTypes: [1], from_um: 0 },
          { name: 'dendrite', swcTypes: [3], from_um: 0, to_um: 40 },
        ]),
        [],
      ),
    );

    expect(refusals).toMatchObject([
      {
        code: 'document-field-missing',
        thing: 'region for SWC type 2',
        place: 'cell.regions',
        value: expect.stringContaining('100.0 µm of cable'),
      },
      {
        thing: 'region for SWC type 3',
        value: expect.stringMatching(/60\.0 µm of cable .* the nearest 70\.0 µm from the soma/),
      },
    ]);
  });

  it('refuses a soma without a region, a name given twice and an empty span, all at once', () => {
    const refusals = refusalsOf(() =>
      cutGrid(
        withRegions([
          { name: 'all', swcTypes: [2, 3], from_um: 0 },
          { name: 'all', swcTypes: [4], from_um: 0 },
          { name: 'none', swcTypes: [4], from_um: 50, to_um: 50 },
        ]),
        [],
      ),
    );

    expect(refusals.map(({ code, place }) => [code, place])).toEqual([
      ['name-twice', 'cell.regions[1].name'],
      ['quantity-out-of-range', 'cell.regions[2].to_um'],
      ['document-field-missing', 'cell.regions'],
    ]);
  });
});
