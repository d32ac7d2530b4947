import { describe, expect, it } from 'vitest';
import { reachByRegion, reachOf, trustDistance } from '../../src-main/forecast/reach.ts';

// A fork: 0 (soma) – 1 – 2 and 1 – 3 – 4; distances in µm for reading, here in the same unit throughout.
const grid = {
  count: 5,
  parent: Int32Array.of(-1, 0, 1, 1, 3),
  area: Float64Array.of(10, 1, 2, 3, 4),
  distance: Float64Array.of(0, 100, 200, 150, 300),
  regionNames: ['soma', 'dendrite', 'axon'],
  regionArea: [Float64Array.of(10, 0.5, 0, 0, 0), Float64Array.of(0, 0.5, 2, 3, 4), new Float64Array(5)],
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
