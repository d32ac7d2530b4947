// What a grid keeps of a shape, whatever the shape: membrane, numbering, sites, the length rule.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cutGrid } from '../../src-main/cell/cut.ts';
import { generatedSwc } from '../../src-main/cell/generators.ts';
import type { ShapedCellDocument, Site } from '../../src-main/contract/documents.ts';
import { drawCell } from '../../src-main/cell/drawing.ts';
import { shapeOf } from '../../src-main/cell/shape.ts';
import { passiveCell, steadyVoltages, swcShape, total } from '../support/shape-cells.ts';
import { randomSwc, split } from '../support/swc-random.ts';

const numbers = { Rm_kOhm_cm2: 15, Ri_Ohm_cm: 150, Cm_uF_cm2: 0.9 };
const pyramidal = swcShape(generatedSwc({ kind: 'tree', cellType: 'layer-5-like pyramidal', seed: 11, size: 1 }));
const spiny: ShapedCellDocument = {
  ...passiveCell(pyramidal, numbers),
  regions: [
    { name: 'soma', swcTypes: [1], from_um: 0 },
    { name: 'axon', swcTypes: [2], from_um: 0 },
    { name: 'near', swcTypes: [3, 4], from_um: 0, to_um: 63.7 },
    { name: 'far', swcTypes: [3, 4], from_um: 63.7 },
  ],
  makeUp: ['soma', 'axon', 'near', 'far'].map((region, n) => ({
    region,
    capacitance_uF_cm2: 0.8 + n / 10,
    axialResistivity_Ohm_cm: 100 + 20 * n,
    spineFactor: region === 'far' ? 1.9 : 1,
    leak: { conductance_mS_cm2: 0.05 + n / 100, reversal_mV: -60 - n },
    channels: region === 'near' ? [] : [{ channel: 'na', density_mS_cm2: 10 * n }],
  })),
};

describe('the grid of a shape', () => {
  it('keeps the membrane of the shape: spheres, cones and spines, to rounding', () => {
    const { report } = shapeOf(pyramidal);
    const { soma_area_um2, neurite_area_um2 } = report.measures!;
    const grid = cutGrid(passiveCell(pyramidal, numbers), []);

    expect(total(grid.area) / ((soma_area_um2 + neurite_area_um2) * 1e-12)).toBeCloseTo(1, 10);
    expect(total(grid.capacitance) / (total(grid.area) * 0.009)).toBeCloseTo(1, 10);
  });

  it('gives each piece the densities of its own region, also in compartments that lie in two', () => {
    const grid = cutGrid(spiny, []);
    const areaOf = (region: string) => total(grid.regionArea[grid.regionNames.indexOf(region)]!);
    const capacitance = ['soma', 'axon', 'near', 'far'].reduce(
      (sum, region, n) => sum + areaOf(region) * (0.8 + n / 10) * 1e-2,
      0,
    );
    const leak = ['soma', 'axon', 'near', 'far'].reduce(
      (sum, region, n) => sum + areaOf(region) * (0.05 + n / 100) * 10,
      0,
    );

    expect(total(grid.capacitance) / capacitance).toBeCloseTo(1, 10);
    expect(total(grid.conductances[0]!.conductance) / leak).toBeCloseTo(1, 10);
    expect(total(grid.area) / ['soma', 'axon', 'near', 'far'].reduce((sum, r) => sum + areaOf(r), 0)).toBeCloseTo(
      1,
      12,
    );
    const mixed = grid.area.filter((_, k) => grid.regionArea.filter((areas) => areas[k]! > 0).length > 1);
    expect(mixed.length).toBeGreaterThan(5);
    const drawn = drawCell(spiny, grid);
    // 1.9 is the spine factor; lengths of the two dendritic regions add up to all of types 3 and 4.
    expect(total(drawn.regions.map((region) => region.length_um))).toBeCloseTo(
      shapeOf(pyramidal).report.measures!.neurite_length_um,
      4,
    );
  });

  it('weighs reversal potentials by conductance and leaves unknown ones to the stored channel', () => {
    const grid = cutGrid(spiny, []);
    const [leak, na] = grid.conductances;

    expect(leak?.channel).toBe('leak');
    expect(Math.min(...leak!.reversal)).toBeGreaterThanOrEqual(-0.063 - 1e-12);
    expect(Math.max(...leak!.reversal)).toBeLessThanOrEqual(-0.06 + 1e-12);
    expect(na?.channel).toBe('na');
    expect(na?.reversal.every(Number.isNaN)).toBe(true);
  });

  it('numbers parents before children and unbranched runs without gaps, the soma first', () => {
    const grid = cutGrid(spiny, []);

    expect(grid.parent[0]).toBe(-1);
    expect(grid.branch[0]).toBe(0);
    for (let k = 1; k < grid.count; k += 1) {
      expect(grid.parent[k]).toBeGreaterThanOrEqual(0);
      expect(grid.parent[k]).toBeLessThan(k);
      if (grid.branch[k] === grid.branch[k - 1]) expect(grid.parent[k]).toBe(k - 1);
      expect(grid.coupling[k]).toBeGreaterThan(0);
      expect(grid.area[k]).toBeGreaterThan(0);
    }
  });

  it('spaces centres by at most 0.1 length constants at 100 Hz', () => {
    const grid = cutGrid(passiveCell(pyramidal, numbers), []);
    const { branches } = shapeOf(pyramidal);
    for (let k = 1; k < grid.count; k += 1) {
      const branch = branches[grid.branch[k]!]!;
      const isFirst = grid.branch[grid.parent[k]!] !== grid.branch[k];
      const from = isFirst ? 0 : grid.at[grid.parent[k]!]!;
      // The thickest radius within the stretch: the rule must hold with it, and hence the bound is a loose one.
      const radii = branch.radius.filter((_, n) => branch.at[n]! >= from - 1e-5 && branch.at[n]! <= grid.at[k]! + 1e-5);
      const lambda = 0.5 * Math.sqrt((2 * Math.max(...radii)) / (Math.PI * 100 * 1.5 * 0.009));

      expect(grid.at[k]! - from).toBeLessThanOrEqual(0.1 * lambda * 1.000001);
    }
  });

  it('halves every spacing at fineness 0.5 and keeps the centres it had', () => {
    const site: Site = { branch: 3, at_um: 7.3 };
    const coarse = cutGrid(spiny, [site]);
    const fine = cutGrid(spiny, [site], { fineness: 0.5 });
    const places = new Set(Array.from(fine.at, (at, k) => `${fine.branch[k]}:${(at * 1e6).toFixed(4)}`));

    expect(fine.count - 1).toBe(2 * (coarse.count - 1));
    for (let k = 0; k < coarse.count; k += 1)
      expect(places).toContain(`${coarse.branch[k]}:${(coarse.at[k]! * 1e6).toFixed(4)}`);
  });

  it('converges at second order on a branched, tapering cell', () => {
    const tree = passiveCell(
      swcShape(
        '1 1 0 0 0 8 -1\n2 3 8 0 0 2 1\n3 3 250 0 0 0.8 2\n4 3 400 90 0 0.4 3\n5 3 300 -200 0 0.3 3\n6 2 -8 0 0 1 1\n7 2 -400 0 0 0.2 6\n',
      ),
      numbers,
    );
    const R = [1, 0.5, 0.25, 0.125].map((fineness) => steadyVoltages(cutGrid(tree, [], { fineness }), 0)[0]!);
    const differences = [R[0]! - R[1]!, R[1]! - R[2]!, R[2]! - R[3]!].map(Math.abs);

    // Successive differences fall as errors do; no closed form is needed.
    for (const [n, difference] of differences.slice(1).entries())
      expect(Math.log2(differences[n]! / difference)).toBeGreaterThan(1.9);
  });
});

describe('sites', () => {
  const { branches } = shapeOf(pyramidal);
  const lengths = branches.map((branch) => branch.at.at(-1)! * 1e6);

  it('makes every site a centre, exactly', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.nat(branches.length - 1), fc.double({ min: 0, max: 1, noNaN: true })), { maxLength: 6 }),
        (wanted) => {
          const sites = wanted.map(([branch, share]) => ({ branch, at_um: share * lengths[branch]! }));
          const grid = cutGrid(passiveCell(pyramidal, numbers), sites);
          for (const site of sites) {
            const k = grid.compartmentAt(site, 'site');
            const centre = grid.branch[k] === site.branch ? grid.at[k]! * 1e6 : 0;
            // Nearer than 0.5 µm to another centre, a site uses that.
            expect(Math.abs(centre - site.at_um)).toBeLessThan(0.5);
            const isAlone = sites.every(
              (other) => other === site || other.branch !== site.branch || Math.abs(other.at_um - site.at_um) > 1,
            );
            const isInside = site.at_um > 1 && site.at_um < lengths[site.branch]! - 1;
            if (isAlone && isInside) expect(Math.abs(centre - site.at_um)).toBeLessThan(1e-9);
          }
        },
      ),
      { numRuns: 25 },
    );
  });

  it('uses the centre of a fork for a site nearer than 0.5 µm, and gives a further one its own', () => {
    const end = lengths[1]!;
    const near = { branch: 1, at_um: end - 0.4 };
    const apart = { branch: 1, at_um: end - 0.6 };
    const placeOf = (site: { branch: number; at_um: number }) => {
      const grid = cutGrid(passiveCell(pyramidal, numbers), [site]);
      return grid.at[grid.compartmentAt(site, 'site')]! * 1e6;
    };

    expect(placeOf(near)).toBeCloseTo(end, 6);
    expect(placeOf(apart)).toBeCloseTo(end - 0.6, 6);
  });

  it.each([
    [{ branch: 9999, at_um: 0 }, 'rig.pipettes[0].site.branch', 'give a branch from 0 to'],
    [{ branch: 1, at_um: 1e5 }, 'rig.pipettes[0].site.at_um', 'give a distance from 0 to'],
    [{ branch: 0, at_um: 3 }, 'rig.pipettes[0].site.at_um', 'give a distance from 0 to 0.000 µm'],
    [{ compartment: 'soma' }, 'rig.pipettes[0].site.compartment', 'give branch and at_um'],
  ])('refuses %o and names the range', (site, place, remedy) => {
    const grid = cutGrid(passiveCell(pyramidal, numbers), []);

    expect(() => grid.compartmentAt(site, 'rig.pipettes[0].site')).toThrow(
      expect.objectContaining({
        data: expect.objectContaining({ code: 'site-off-the-cell', place, remedy: expect.stringContaining(remedy) }),
      }),
    );
  });
});

describe('samples that say nothing new', () => {
  it('splitting every cone in two changes no compartment', () => {
    fc.assert(
      fc.property(randomSwc, (rows) => {
        const whole = cutGrid(passiveCell(swcShape(rows.join('\n')), numbers), []);
        const halved = cutGrid(passiveCell(swcShape(split(rows).join('\n')), numbers), []);

        expect(halved.count).toBe(whole.count);
        for (let k = 0; k < whole.count; k += 1) {
          // Rounding of coordinates in text, none of it from the cut.
          expect(Math.abs(halved.area[k]! / whole.area[k]! - 1)).toBeLessThan(1e-9);
          if (k > 0) expect(Math.abs(halved.coupling[k]! / whole.coupling[k]! - 1)).toBeLessThan(1e-9);
        }
      }),
      { numRuns: 60 },
    );
  });

  it('the order of a file changes no input resistance', () => {
    fc.assert(
      fc.property(randomSwc, fc.infiniteStream(fc.double({ min: 0, max: 1, noNaN: true })), (rows, dice) => {
        const keyed = rows.map((row) => ({ row, key: dice.next().value as number }));
        const shuffled = keyed.sort((a, b) => a.key - b.key).map(({ row }) => row);
        const R = [rows, shuffled].map((text) => {
          const grid = cutGrid(passiveCell(swcShape(text.join('\n')), numbers), []);
          return steadyVoltages(grid, 0)[0]!;
        });

        expect(R[1]! / R[0]!).toBeCloseTo(1, 9);
      }),
      { numRuns: 60 },
    );
  });
});

it('refuses more than 200,000 compartments without making them', () => {
  const hair = swcShape('1 3 0 0 0 0.0001 -1\n2 3 1e9 0 0 0.0001 1\n');

  expect(() => cutGrid(passiveCell(hair, numbers), [])).toThrow(
    expect.objectContaining({ data: expect.objectContaining({ code: 'too-large' }) }),
  );
});
