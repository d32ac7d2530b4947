// The cell on the picture: what is drawn can be picked, and looking does not move the cell.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Site } from '../../src-main/contract/documents.ts';
import type { CellDrawing, DrawnBranch } from '../../src-main/contract/results.ts';
import {
  fit,
  pan,
  project,
  projection,
  scaleBar,
  turn,
  zoomAt,
  type Camera,
} from '../../src-renderer/canvas/camera.ts';
import { cellModel, extent } from '../../src-renderer/canvas/cell-model.ts';
import { colourSteps, stepOf } from '../../src-renderer/canvas/colours.ts';
import { pick, placeOf } from '../../src-renderer/canvas/pick.ts';
import { pickPipette, pipettePlace } from '../../src-renderer/canvas/pipette-place.ts';
import { projected } from '../../src-renderer/canvas/projected.ts';
import { movedSite, siteAt, siteDistance, siteWords } from '../../src-renderer/text/places.ts';

const size = { width: 400, height: 500 };
const f = (...values: number[]): Float64Array => Float64Array.from(values);

function branch(
  number: number,
  parent: number,
  region: string,
  from: readonly number[],
  to: readonly number[],
  start: number,
): DrawnBranch {
  const length = Math.hypot(...from.map((v, i) => v - (to[i] ?? 0)));
  return {
    branch: number,
    parent,
    region,
    xyz_um: f(...from, ...to),
    radius_um: f(1, number === 2 ? 0.8 : 0.5),
    at_um: f(0, length),
    startDistance_um: start,
  };
}

// Invented: a soma of 8 µm radius, a trunk of 100 µm that forks, one thin and one thick child.
const drawing: CellDrawing = {
  branches: [
    branch(0, -1, 'soma', [0, -8, 0], [0, 8, 0], 0),
    branch(1, 0, 'apical', [0, 8, 0], [0, 108, 0], 0),
    { ...branch(2, 1, 'apical', [0, 108, 0], [60, 188, 0], 100), radius_um: f(0.8, 0.8) },
    { ...branch(3, 1, 'apical', [0, 108, 0], [-60, 188, 20], 100), radius_um: f(0.5, 0.5) },
  ],
  soma: { xyz_um: [0, 0, 0], radius_um: 8 },
  regions: [],
  compartments: {
    count: 6,
    branch: Int32Array.of(0, 1, 1, 2, 2, 3),
    at_um: f(8, 25, 75, 25, 75, 51),
    distance_um: f(0, 25, 75, 125, 175, 151),
    area_um2: f(1, 1, 1, 1, 1, 1),
    regionIndex: Int32Array.of(0, 1, 1, 1, 1, 1),
    regionNames: ['soma', 'apical'],
    names: null,
  },
  totalArea_um2: 6,
  totalCapacitance_pF: 1,
  inputResistance_MOhm: 100,
  swcReport: null,
};
const model = cellModel(drawing, false);
const margin = { x: 20, top: 20, bottom: 20 };
const cameras = fc
  .record({
    yaw: fc.double({ min: -3, max: 3, noNaN: true }),
    pitch: fc.double({ min: -1.2, max: 1.2, noNaN: true }),
  })
  .map((angles) => fit(extent(model), size, angles, margin));

describe('the camera', () => {
  it('fits every point within the margins at any angle', () => {
    fc.assert(
      fc.property(cameras, (camera) => {
        const p = projection(camera, size);
        const points = extent(model);
        for (let i = 0; i < points.length; i += 3) {
          const [x, y] = project(p, points[i]!, points[i + 1]!, points[i + 2]!);
          // A millionth of a pixel: rounding.
          expect(x).toBeGreaterThanOrEqual(20 - 1e-6);
          expect(x).toBeLessThanOrEqual(size.width - 20 + 1e-6);
          expect(y).toBeGreaterThanOrEqual(20 - 1e-6);
          expect(y).toBeLessThanOrEqual(size.height - 20 + 1e-6);
        }
      }),
    );
  });

  it('keeps what lies under the pointer there while zooming', () => {
    const pointer = fc.record({ x: fc.integer({ min: 0, max: 400 }), y: fc.integer({ min: 0, max: 500 }) });
    fc.assert(
      fc.property(cameras, pointer, fc.double({ min: 0.8, max: 1.25, noNaN: true }), (camera, at, factor) => {
        const under = (c: Camera): number[] => [
          (at.x - size.width / 2 - c.x) / c.zoom,
          (at.y - size.height / 2 - c.y) / c.zoom,
        ];
        const before = under(camera);
        under(zoomAt(camera, size, at.x, at.y, factor)).forEach((v, i) => expect(v).toBeCloseTo(before[i]!, 6));
      }),
    );
  });

  it('draws up as up, turns left and right, and pans by pixels', () => {
    const camera = { zoom: 1, x: 0, y: 0, yaw: 0, pitch: 0 };
    expect(project(projection(camera, size), 0, 100, 0)).toEqual([200, 150]);
    expect(project(projection(pan(camera, 5, 7), size), 0, 100, 0)).toEqual([205, 157]);
    const [x] = project(projection(turn(camera, Math.PI / 2, 0), size), 0, 0, 50);
    expect(x).toBeCloseTo(250, 9);
  });

  it('gives a scale bar of a round length that fits', () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 200, noNaN: true }), (zoom) => {
        const bar = scaleBar(zoom, 90);
        expect(bar.px).toBeLessThanOrEqual(90 * (1 + 1e-9));
        expect(bar.px).toBeGreaterThan(90 / 5);
        expect([1, 2, 5]).toContain(Number(bar.length_um.toExponential().split('e')[0]));
      }),
    );
  });
});

describe('picking', () => {
  it.each([false, true])('finds the place again that a site is drawn at (flat: %s)', (isFlat) => {
    const shown = cellModel(drawing, isFlat);
    const camera = fit(extent(shown), size, { yaw: 0, pitch: 0 }, margin);
    const cell = projected(shown, camera, size);
    // Right at a branch point the thicker branch covers the thinner, and is rightly picked.
    const sites = fc.record({
      branch: fc.constantFrom(1, 2, 3),
      share: fc.double({ min: 0.15, max: 0.95, noNaN: true }),
    });
    fc.assert(
      fc.property(sites, ({ branch: b, share }) => {
        const at_um = share * drawing.branches[b]!.at_um.at(-1)!;
        const place = placeOf(cell, { branch: b, at_um }, drawing.compartments);
        const picked = pick(cell, place!.x, place!.y, 10, drawing.compartments);
        const site = picked!.site;
        expect('branch' in site && site.branch).toBe(b);
        // Sites are kept to a tenth of a micrometre; half a hundredth for single-precision pixels.
        expect('branch' in site ? site.at_um : NaN).toBeCloseTo(at_um - 0.05, 0);
      }),
    );
  });

  it('finds the soma on its disc and nothing far from the cell', () => {
    const camera = fit(extent(model), size, { yaw: 0, pitch: 0 }, margin);
    const cell = projected(model, camera, size);
    expect(pick(cell, cell.soma!.x + 2, cell.soma!.y, 10, drawing.compartments)?.compartment).toBe(0);
    expect(pick(cell, 5, 5, 10, drawing.compartments)).toBeNull();
  });

  it('names the compartment whose centre is nearest', () => {
    const camera = fit(extent(model), size, { yaw: 0, pitch: 0 }, margin);
    const cell = projected(model, camera, size);
    const place = placeOf(cell, { branch: 1, at_um: 60 }, drawing.compartments)!;
    expect(pick(cell, place.x, place.y, 10, drawing.compartments)?.compartment).toBe(2);
  });

  it('picks a pipette by its head and shaft, and keeps its head in the picture', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 400 }),
        fc.integer({ min: 0, max: 500 }),
        fc.constantFrom('A', 'B'),
        (x, y, letter) => {
          const place = pipettePlace(letter, { x, y }, size);
          expect(place.head.x).toBeGreaterThanOrEqual(10);
          expect(place.head.x).toBeLessThanOrEqual(size.width - 10);
          expect(pickPipette([place], place.head.x, place.head.y)).toBe(letter);
        },
      ),
    );
  });
});

describe('places in words', () => {
  it('go to the thickest branch of a region at that path distance', () => {
    expect(siteAt(drawing, 'apical', 150)).toEqual({ branch: 2, at_um: 50 });
    expect(siteDistance(drawing, { branch: 2, at_um: 50 })).toBe(150);
    expect(siteWords(drawing, { branch: 2, at_um: 50 })).toBe('apical 150\u2009µm');
    expect(siteWords(drawing, { branch: 0, at_um: 4 })).toBe('soma');
  });

  it('moving outward and back again leads to the same place along a branch', () => {
    fc.assert(
      fc.property(fc.integer({ min: 10, max: 90 }), fc.integer({ min: 1, max: 9 }), (at_um, by) => {
        const there = movedSite(drawing, { branch: 1, at_um }, by);
        expect(movedSite(drawing, there, -by)).toEqual({ branch: 1, at_um });
      }),
    );
  });

  it('steps of +1, +10, −1, −10 µm end where they began, at any place and across the branch point', () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 99, noNaN: true }), (at) => {
        const site = { branch: 1, at_um: Number(at.toFixed(2)) };
        const path = [1, 10, -1, -10].reduce<Site>((s, by) => movedSite(drawing, s, by), site);
        expect(path).toEqual(site);
      }),
    );
  });

  it('goes back out into the branch it came in from, thick or thin', () => {
    const thin = { branch: 3, at_um: 4 };
    const inward = movedSite(drawing, thin, -10);
    expect(inward).toEqual({ branch: 1, at_um: 94 });
    expect(movedSite(drawing, inward, 10, 3)).toEqual(thin);
    expect(movedSite(drawing, inward, 10)).toMatchObject({ branch: 2 });
  });

  it('crosses a branch point into the thickest child, and back into the parent', () => {
    expect(movedSite(drawing, { branch: 1, at_um: 95 }, 10)).toEqual({ branch: 2, at_um: 5 });
    expect(movedSite(drawing, { branch: 2, at_um: 5 }, -10)).toEqual({ branch: 1, at_um: 95 });
  });
});

describe('colour scales', () => {
  it('begin and end on their first and last stop', () => {
    const steps = colourSteps(['#000000', '#ff0000', '#ffffff'], 33);
    expect([steps[0], steps[16], steps[32]]).toEqual(['rgb(0 0 0)', 'rgb(255 0 0)', 'rgb(255 255 255)']);
  });

  it('never go back while the value grows, and have no step for no value', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -20, max: 20, noNaN: true }),
        fc.double({ min: 0, max: 5, noNaN: true }),
        (v, more) => {
          expect(stepOf(v + more, -10, 10, 33)).toBeGreaterThanOrEqual(stepOf(v, -10, 10, 33));
        },
      ),
    );
    expect(stepOf(NaN, -10, 10, 33)).toBe(-1);
    expect(stepOf(0, -10, 10, 33)).toBe(16);
  });
});
