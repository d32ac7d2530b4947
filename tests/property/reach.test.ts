import { describe, expect, it } from 'vitest';
import { cutGrid } from '../../src-main/cell/cut.ts';
import type { Grid } from '../../src-main/cell/grid.ts';
import { shapeOf } from '../../src-main/cell/shape.ts';
import { reachByRegion, reachOf, trustDistance } from '../../src-main/forecast/reach.ts';
import { passiveCell, steadyVoltages } from '../support/shape-cells.ts';

// A fork: 0 (soma) – 1 – 2 and 1 – 3 – 4; distances in µm for reading, here in the same unit throughout.
const grid = {
  count: 5,
  parent: Int32Array.of(-1, 0, 1, 1, 3),
  area: Float64Array.of(10, 1, 2, 3, 4),
  distance: Float64Array.of(0, 100, 200, 150, 300),
  regionNames: ['soma', 'dendrite', 'axon'],
  regionArea: [Float64Array.of(10, 0.5, 0, 0, 0), Float64Array.of(0, 0.5, 2, 3, 4), new Float64Array(5)],
  regionStretch: null,
};

describe('reach', () => {
  const error = Float64Array.of(0, -4, -6, 5, 5.1);

  it('is the share of area within the tolerance, its edge included, either sign', () => {
    expect(reachOf(grid, error, 5)).toBe(14 / 20);
  });

  it('by region counts a border compartment by the area it has in each', () => {
    const [soma, dendrite, ...others] = reachByRegion(grid, error, 5);
    expect(soma).toEqual({ region: 'soma', area: 10.5, reach: 1 });
    expect(dendrite).toEqual({ region: 'dendrite', area: 9.5, reach: 3.5 / 9.5 });
    expect(others).toEqual([]); // the axon has no membrane here
  });
});

describe('reach along the way between two centres', () => {
  // A soma of area 10 at its centre, a dendrite of area 8 as one way of two halves of 4 and 2 more at the dendrite's tip.
  const pair = {
    count: 2,
    parent: Int32Array.of(-1, 0),
    area: Float64Array.of(14, 6),
    regionNames: ['soma', 'dendrite'],
    regionArea: [Float64Array.of(10, 0), Float64Array.of(4, 6)],
    regionStretch: [
      { own: new Float64Array(2), parents: new Float64Array(2) },
      { own: Float64Array.of(0, 4), parents: Float64Array.of(0, 4) },
    ],
  };
  const inside = (...error: number[]): number => 20 * reachOf(pair, Float64Array.from(error), 5);

  it('counts the part of the way on which the straight error is within the tolerance', () => {
    // 5 is passed after 5/8 of the way: all of the first half, a quarter of the second.
    expect(inside(0, 8)).toBeCloseTo(10 + 4 + 1, 12);
    // After 5/20: half of the first half.
    expect(inside(0, -20)).toBeCloseTo(10 + 2, 12);
    // The same from the other end: half of the second half, and the tip.
    expect(inside(-20, 0)).toBeCloseTo(2 + 2, 12);
    // In only from −5 to 5, a quarter of the way about its middle, though both centres are out.
    expect(inside(-20, 20)).toBeCloseTo(2, 12);
  });

  it('is whole where both centres are in, and nothing where the way never enters', () => {
    expect(inside(5, -5)).toBe(20);
    expect(inside(6, 20)).toBe(0);
    expect(inside(-6, -6)).toBe(0);
  });

  it('gives each region its own part', () => {
    expect(reachByRegion(pair, Float64Array.of(0, 8), 5)).toEqual([
      { region: 'soma', area: 10, reach: 1 },
      { region: 'dendrite', area: 10, reach: 0.5 },
    ]);
  });
});

describe('reach on a branching cell', () => {
  const cell = passiveCell(
    { kind: 'generator', generator: { kind: 'tree', cellType: 'granule-like', seed: 5, size: 1 } },
    { Rm_kOhm_cm2: 5, Ri_Ohm_cm: 200, Cm_uF_cm2: 1 },
  );
  // What a voltage set at the soma lacks elsewhere, as a share of it.
  const coarse = cutGrid(cell, []);
  const lacking = (grid: Grid): Float64Array => {
    const V = steadyVoltages(grid, 0);
    return V.map((each) => 1 - each / V[0]!);
  };

  it('has all membrane either on the ways between centres or at a centre', () => {
    const left = coarse.area.slice();
    for (const { own, parents } of coarse.regionStretch ?? []) {
      for (let k = 1; k < coarse.count; k += 1) {
        left[k]! -= own[k]!;
        left[coarse.parent[k]!]! -= parents[k]!;
      }
    }
    const sphere = 4 * Math.PI * (shapeOf(cell.shape).soma?.radius ?? NaN) ** 2;
    expect(left[0]! / sphere).toBeCloseTo(1, 9);
    for (let k = 1; k < coarse.count; k += 1) expect(Math.abs(left[k]! / coarse.area[k]!)).toBeLessThan(1e-9);
  });

  it('moves by a thousandth at most when the grid is halved, where whole compartments move it by several', () => {
    const fine = cutGrid(cell, [], { fineness: 0.5 });
    const [errors, finer] = [lacking(coarse), lacking(fine)];
    const whole = (grid: Grid): Grid => ({ ...grid, regionStretch: null });
    const moves = (look: (grid: Grid) => Grid): number[] =>
      [0.01, 0.02, 0.03, 0.05, 0.08].map((share) =>
        Math.abs(reachOf(look(coarse), errors, share) - reachOf(look(fine), finer, share)),
      );
    // Measured: 6e-4 at the most, against 1.3e-2.
    expect(Math.max(...moves((grid) => grid))).toBeLessThan(1e-3);
    expect(Math.max(...moves(whole))).toBeGreaterThan(3e-3);
  });
});

describe('trust distance', () => {
  it('is the nearest first exit over all paths, on the line between two centres', () => {
    // Path 0-1-2 leaves at −5 between −4 (100) and −6 (200); path 0-1-3-4 at +5 between 4 (150) and 8 (300).
    expect(trustDistance(grid, Float64Array.of(0, -4, -6, 4, 8), 5)).toBe(150);
    expect(trustDistance(grid, Float64Array.of(0, -4, -4.5, 4, 8), 5)).toBe(187.5);
  });

  it('does not begin again behind an exit', () => {
    expect(trustDistance(grid, Float64Array.of(0, 10, 0, 0, 9), 5)).toBe(50);
  });

  it('is 0 where the root itself is out, and null where nothing leaves', () => {
    expect(trustDistance(grid, Float64Array.of(6, 0, 0, 0, 0), 5)).toBe(0);
    expect(trustDistance(grid, new Float64Array(5), 5)).toBeNull();
  });

  it('takes the crossing on the side the error leaves by', () => {
    // From +2 to −8: the line passes −5 after 7 tenths of the way.
    expect(trustDistance(grid, Float64Array.of(0, 2, -8, 0, 0), 5)).toBe(170);
  });
});
