// True of every tree of compartments, whatever the numbers.
import { describe, expect, it } from 'vitest';
import { operatingPoint } from '../../src-main/solver/operating-point.ts';
import { runSweep } from '../../src-main/solver/sweep.ts';
import {
  attenuation,
  controlFrom,
  inputResistance,
  slopeConductance,
  steadyTree,
  transferResistance,
} from '../../src-main/solver/steady.ts';
import { gridOf, numbersFrom, randomCompartments, renumbered } from '../support/random-trees.ts';
import { allAt, finished, largestDifference, pipette, steps, sweepOf } from '../support/small-grids.ts';
import { k, na, squidKinetics } from '../support/squid.ts';

const seeds = Array.from({ length: 12 }, (_, i) => 101 + 7 * i);
/** Too little sodium to fire on its own, enough to bend the membrane's answer. */
const calm = { [na]: 8, [k]: 6 };

function atRest(seed: number) {
  const grid = gridOf(randomCompartments(seed, calm));
  const held = { ...pipette('current clamp', []), holding: 0 };
  const point = operatingPoint({ grid, kinetics: squidKinetics, temperature: 6.3, pipettes: [held] });
  return { grid, point, slope: slopeConductance(grid, squidKinetics, 6.3, point.state.V) };
}

describe('steady state of random trees', () => {
  it.each(seeds)('leaves no current over at the operating point (seed %s)', (seed) => {
    const { grid, point } = atRest(seed);
    expect(point.firesOnItsOwn).toBe(false);
    // Let go from there, nothing moves: 0.2 µV is the gate tables' error, not the point's.
    const run = sweepOf({
      ...{ grid, kinetics: squidKinetics, start: point.state, duration: 0.05 },
      pipettes: [pipette('current clamp', steps('pA', 50, [[0, 0]]))],
    });
    const after = finished(runSweep(run)).end.V;
    expect(largestDifference(after, point.state.V)).toBeLessThan(2e-7);
  });

  it.each(seeds)('has the same transfer resistance both ways, to 1e-9 (seed %s)', (seed) => {
    const { grid, slope } = atRest(seed);
    const tree = steadyTree(grid, slope);
    const next = numbersFrom(seed);
    for (let pair = 0; pair < 20; pair++) {
      const [a, b] = [Math.floor(next() * grid.count), Math.floor(next() * grid.count)];
      const there = transferResistance(tree, a, b);
      expect(Math.abs(transferResistance(tree, b, a) / there - 1)).toBeLessThan(1e-9);
      // What arrives is what was put in, divided by the attenuation.
      expect(Math.abs(there * attenuation(tree, a, b) - inputResistance(tree, a))).toBeLessThan(
        1e-9 * inputResistance(tree, a),
      );
    }
  });

  it.each(seeds.slice(0, 6))('predicts by its slope what a small current does after a while (seed %s)', (seed) => {
    const { grid, point, slope } = atRest(seed);
    const site = grid.count - 1;
    const run = (current: number) =>
      finished(
        runSweep(
          sweepOf({
            ...{ grid, kinetics: squidKinetics, start: point.state, duration: 0.4, sampling: 1e-3, step: 1e-4 },
            pipettes: [pipette('current clamp', steps('pA', 400, [[0, current]]), { compartment: site })],
          }),
        ),
      ).end.V;
    const [up, down] = [run(0.05), run(-0.05)];
    const tree = steadyTree(grid, slope);
    for (const c of [0, site, Math.floor(site / 2)]) {
      // Central difference of 0.1 pA; curvature and the tables' small steps leave 1e-3.
      const found = (up[c]! - down[c]!) / 1e-13;
      expect(Math.abs(found / transferResistance(tree, site, c) - 1), `compartment ${c}`).toBeLessThan(2e-3);
    }
  });

  it.each(seeds.slice(0, 6))('is controlled by a clamp as a long clamp step controls it (seed %s)', (seed) => {
    const grid = gridOf(randomCompartments(seed, {}));
    const before = allAt(grid, -54.387);
    const run = sweepOf({
      ...{ grid, start: before, duration: 1, sampling: 1e-2, step: 1e-3 },
      pipettes: [pipette('voltage clamp', steps('mV', 1000, [[0, -44.387]]))],
    });
    const V = finished(runSweep(run)).end.V;
    const control = controlFrom(steadyTree(grid, slopeConductance(grid, new Map(), 6.3, before.V)), 0);
    control.forEach((share, c) => expect(Math.abs((V[c]! + 0.054387) / 0.01 - share)).toBeLessThan(1e-9));
  });
});

describe('sweeps of random trees', () => {
  const twoPipettes = (site: number) => [
    pipette(
      'voltage clamp',
      steps('mV', 20, [
        [0, -70],
        [3, -40],
        [11.01, -70],
      ]),
      { access: 7e6, stray: 3e-12 },
    ),
    pipette(
      'current clamp',
      steps('pA', 20, [
        [0, 0],
        [6, 80],
        [9, 0],
      ]),
      { letter: 'B', compartment: site, access: 20e6, stray: 4e-12 },
    ),
  ];

  it.each(seeds)('do not depend on how compartments are numbered (seed %s)', (seed) => {
    const compartments = randomCompartments(seed, calm);
    const moved = renumbered(compartments, seed + 1);
    const site = compartments.length - 1;
    const run = (grid: ReturnType<typeof gridOf>, own: number) =>
      finished(
        runSweep(
          sweepOf({
            ...{ grid, kinetics: squidKinetics, start: allAt(grid, -70), duration: 0.02, probes: [own] },
            pipettes: twoPipettes(own),
          }),
        ),
      );
    const [one, other] = [run(gridOf(compartments), site), run(gridOf(moved.compartments), moved.at[site]!)];
    // Sums are taken in another order: rounding, which this calm cell does not grow.
    one.recorded.forEach((values, p) => {
      const largest = Math.max(...values.map(Math.abs));
      expect(largestDifference(values, other.recorded[p]!) / largest).toBeLessThan(1e-10);
    });
    const back = Float64Array.from(moved.at, (to) => other.end.V[to]!);
    expect(largestDifference(one.end.V, back)).toBeLessThan(1e-12);
  });

  it.each(seeds)('keep the charge: what enters is stored or leaks out (seed %s)', (seed) => {
    const grid = gridOf(randomCompartments(seed, {}));
    const site = grid.count - 1;
    let leaked = 0;
    let before: Float64Array | null = null;
    const leak = grid.conductances[0]!;
    const out = (V: Float64Array): number =>
      V.reduce((sum, value, c) => sum + leak.conductance[c]! * (value - leak.reversal[c]!), 0);
    const h = 25e-6;
    const charge = (V: Float64Array): number => V.reduce((sum, value, c) => sum + grid.capacitance[c]! * value, 0);
    const start = allAt(grid, -70);
    // No break after the start; the six damped steps there are kept apart, since they are not trapezoidal.
    const kept: { V: Float64Array | null } = { V: null };
    const run = finished(
      runSweep(
        sweepOf({
          ...{ grid, start, duration: 0.01, sampling: h, step: h },
          pipettes: [
            pipette('current clamp', [{ start: 0, end: 0.01, v0: 0, v1: 1e-10 }], { compartment: site, stray: 0 }),
          ],
          onSample(index, V) {
            if (index === 6) kept.V = V.slice();
            if (index > 6) leaked += (h / 2) * (out(before!) + out(V));
            before = V.slice();
          },
        }),
      ),
    );
    const put = ((1e-10 + (1e-10 * 6 * h) / 0.01) / 2) * (0.01 - 6 * h);
    const stored = charge(run.end.V) - charge(kept.V!);
    expect(Math.abs(put - leaked - stored)).toBeLessThan(1e-9 * (Math.abs(put) + Math.abs(leaked)));
  });
});
