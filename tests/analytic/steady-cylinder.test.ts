// Closed forms at DC: Rall W (1959), Exp Neurol 1:491–527; Rall W (1977), Handbook of Physiology, The Nervous System,
// vol. 1, ch. 3 (both from memory).
import { describe, expect, it } from 'vitest';
import { operatingPoint } from '../../src-main/solver/operating-point.ts';
import {
  accessShare,
  attenuation,
  controlFrom,
  inputResistance,
  slopeConductance,
  steadyTree,
  transferResistance,
} from '../../src-main/solver/steady.ts';
import { observedOrders } from '../support/observed-orders.ts';
import { cylinder, pipette, smallGrid, type SmallCompartment } from '../support/small-grids.ts';
import { squidKinetics, squidPatch } from '../support/squid.ts';

const cable = { d_um: 2, length_um: 1000, Rm_ohm_cm2: 20000, Ri_ohm_cm: 150, Cm_uF_cm2: 1, rest_mV: -70 };
const lambda_um = 816.496581;
const L = 1000 / lambda_um;
const sealed_MOhm = 463.526792; // 1/(G∞·tanh L)
const passive = (grid: ReturnType<typeof cylinder>) => steadyTree(grid, grid.conductances[0]!.conductance);

describe('sealed cylinder at DC', () => {
  it('has the input resistance R∞·coth L within 0.5 % at 0.1 length constants at 100 Hz, at second order', () => {
    const errors = [31, 62, 124].map((n) => inputResistance(passive(cylinder(n, cable)), 0) / (sealed_MOhm * 1e6) - 1);
    expect(Math.abs(errors[0]!)).toBeLessThan(0.005);
    for (const order of observedOrders(errors.map(Math.abs))) expect(order).toBeCloseTo(2, 1);
    expect(Math.abs(errors[2]!)).toBeLessThan(1.2e-5); // measured 1.05e-5
  });

  it('is held along its length as cosh(L − X)/cosh L, from x = 0, and attenuates by cosh L', () => {
    const n = 124;
    const tree = passive(cylinder(n, cable));
    const control = controlFrom(tree, 0);
    for (const x of [0, 250, 500, 750, 1000]) {
      const exact = Math.cosh(L - x / lambda_um) / Math.cosh(L);
      expect(Math.abs(control[(n * x) / 1000]! / exact - 1), `${x} µm`).toBeLessThan(2e-5);
    }
    expect(attenuation(tree, 0, n)).toBeCloseTo(Math.cosh(L), 4);
    // A cylinder is the same from both ends.
    expect(attenuation(tree, n, 0)).toBeCloseTo(attenuation(tree, 0, n), 10);
  });

  it('lets R/(R + Rs) of the command through an access resistance', () => {
    const tree = passive(cylinder(124, cable));
    expect(accessShare(tree, 0, 20e6)).toBeCloseTo(sealed_MOhm / (sealed_MOhm + 20), 6);
    expect(accessShare(tree, 0, 0)).toBe(1);
  });
});

describe('five compartments in a Y', () => {
  // Dense inverse by another program: MΩ.
  const y: SmallCompartment[] = [
    { parent: -1, area_um2: 1500, channels: { leak: 0.05 } },
    { parent: 0, coupling_nS: 25, area_um2: 600, channels: { leak: 0.05 } },
    { parent: 1, coupling_nS: 8, area_um2: 300, channels: { leak: 0.05 } },
    { parent: 2, coupling_nS: 1.5, area_um2: 200, channels: { leak: 0.05 } },
    { parent: 2, coupling_nS: 4, area_um2: 800, channels: { leak: 0.05 } },
  ];
  const tree = passive(smallGrid(y, { leak: -70 }));

  it('has the resistances of the dense inverse, and attenuates differently each way', () => {
    expect(inputResistance(tree, 0) / 1e6).toBeCloseTo(630.6646266, 6);
    expect(inputResistance(tree, 3) / 1e6).toBeCloseTo(1203.817249, 6);
    expect(transferResistance(tree, 0, 3) / 1e6).toBeCloseTo(531.1582457, 6);
    expect(transferResistance(tree, 3, 0) / 1e6).toBeCloseTo(531.1582457, 6);
    expect(1 / attenuation(tree, 0, 3)).toBeCloseTo(0.8422198158, 9);
    expect(1 / attenuation(tree, 3, 0)).toBeCloseTo(0.4412283061, 9);
  });

  it('counts a shunt at any compartment once', () => {
    const shunted = steadyTree(tree.grid, tree.grid.conductances[0]!.conductance, [[3, 1e-9]]);
    // Two parallel conductances: 1/R' = 1/R + 1 nS at the compartment itself.
    expect(1 / inputResistance(shunted, 3)).toBeCloseTo(1 / inputResistance(tree, 3) + 1e-9, 20);
  });
});

describe('tree that obeys the 3/2-power rule', () => {
  it('takes the current of its equivalent cylinder', () => {
    // Levels, each with its diameters (µm) and an electrotonic length; daughters' d^1.5 sum to the parent's.
    const levels = [
      { d: [8], L: 0.2, parents: [-1] },
      { d: [5.0396842, 5.0396842], L: 0.3, parents: [0, 0] },
      { d: [2.25848647, 3.97315355, 2.25848647, 3.97315355], L: 0.25, parents: [0, 0, 1, 1] },
    ];
    const n = 100;
    const compartments: SmallCompartment[] = [{ parent: -1, area_um2: 1e-9, channels: { leak: 0.05 } }];
    const area = [1e-9];
    let ends: number[] = [];
    for (const level of levels) {
      ends = level.d.map((d, i) => {
        const dx = (level.L * 1e4 * Math.sqrt((20000 * d * 1e-4) / (4 * 150))) / n;
        let last = level.parents[i] === -1 ? 0 : ends[level.parents[i]!]!;
        for (let piece = 0; piece < n; piece++) {
          const half = (Math.PI * d * dx) / 2;
          area[last]! += half;
          area.push(half);
          const coupling_nS = (1e5 * Math.PI * d * d) / (4 * 150 * dx);
          last = compartments.push({ parent: last, coupling_nS, area_um2: 0, channels: { leak: 0.05 } }) - 1;
        }
        return last;
      });
    }
    const grid = smallGrid(
      compartments.map((c, k) => ({ ...c, area_um2: area[k]! })),
      { leak: -70 },
    );
    // G∞ of the 8 µm root over L = 0.75, S.
    const exact = 2.56509966e-9 * 4 ** 1.5 * Math.tanh(0.75);
    const found = 1 / inputResistance(passive(grid), 0);
    expect(Math.abs(found / exact - 1)).toBeLessThan(1e-5); // h²/3 with pieces of 0.003 λ
  });
});

describe('squid membrane at rest', () => {
  it('has the slope conductance of its steady current, gates following, not the chord conductance', () => {
    const grid = squidPatch();
    const { state } = operatingPoint({
      ...{ grid, kinetics: squidKinetics, temperature: 6.3 },
      pipettes: [{ ...pipette('current clamp', []), holding: 0 }],
    });
    const slope = slopeConductance(grid, squidKinetics, 6.3, state.V)[0]!;
    // Independent: 1.16689 mS/cm² (the chord conductance is 0.677521).
    expect(slope / 1e-8).toBeCloseTo(1.16689, 4);
  });
});
