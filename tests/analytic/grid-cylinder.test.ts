// Closed forms: uniform passive cylinder, far end sealed, and a sphere with one such cylinder. Rall (1959), Exp. Neurol.
// 1:491-527 (from memory); λ = √(d·Rm/4Ri), G∞ = π·d²/(4·Ri·λ), sphere π·D²/Rm. Sizes: round numbers of our own.
import { describe, expect, it } from 'vitest';
import { cutGrid } from '../../src-main/cell/cut.ts';
import type { ShapeSource } from '../../src-main/contract/documents.ts';
import { ordersOf, passiveCell, steadyVoltages, swcShape, total } from '../support/shape-cells.ts';

const stick = { d: 2e-6, l: 1e-3, Rm: 1, Ri: 1 };
const lambda = Math.sqrt((stick.d * stick.Rm) / (4 * stick.Ri));
const L = stick.l / lambda;
const endless = (4 * stick.Ri * lambda) / (Math.PI * stick.d ** 2);
const cylinder = passiveCell(swcShape('1 3 0 0 0 1 -1\n2 3 1000 0 0 1 1\n'), {
  Rm_kOhm_cm2: 10,
  Ri_Ohm_cm: 100,
  Cm_uF_cm2: 1,
});

describe('sealed cylinder, Rall 1959', () => {
  it('has couplings π·d²/(4·Ri·h) and half compartments at both ends', () => {
    const grid = cutGrid(cylinder, []);
    const h = stick.l / (grid.count - 1);

    for (let k = 1; k < grid.count; k += 1) {
      // Rounding only.
      expect(grid.coupling[k]! / ((Math.PI * stick.d ** 2) / (4 * stick.Ri * h))).toBeCloseTo(1, 10);
      const share = k === grid.count - 1 ? 0.5 : 1;
      expect(grid.area[k]! / (share * Math.PI * stick.d * h)).toBeCloseTo(1, 10);
    }
    expect(grid.area[0]! / (0.5 * Math.PI * stick.d * h)).toBeCloseTo(1, 10);
  });

  it('input resistance converges to R∞·coth(l/λ) at second order in compartment length', () => {
    const exact = endless / Math.tanh(L);
    const errors = [1, 0.5, 0.25, 0.125].map((fineness) => {
      const grid = cutGrid(cylinder, [], { fineness });
      return Math.abs(steadyVoltages(grid, 0)[0]! / exact - 1);
    });

    // Measured: 2.00 throughout.
    for (const order of ordersOf(errors)) expect(order).toBeGreaterThan(1.9);
    expect(errors[0]).toBeLessThan(5e-4); // the default grid, measured 3.3e-4
  });

  it('steady profile converges to cosh((l − x)/λ) at second order everywhere', () => {
    const errors = [1, 0.5, 0.25, 0.125].map((fineness) => {
      const grid = cutGrid(cylinder, [], { fineness });
      const V = steadyVoltages(grid, 0);
      const exact = (k: number) => (endless * Math.cosh(L - grid.at[k]! / lambda)) / Math.sinh(L);
      return V.reduce((worst, v, k) => Math.max(worst, Math.abs(v / exact(k) - 1)), 0);
    });

    for (const order of ordersOf(errors)) expect(order).toBeGreaterThan(1.9);
  });

  it('keeps second order where a site sits at an odd place', () => {
    const exact = endless / Math.tanh(L);
    const errors = [1, 0.5, 0.25, 0.125].map((fineness) => {
      const grid = cutGrid(cylinder, [{ branch: 0, at_um: 137.31 }], { fineness });
      return Math.abs(steadyVoltages(grid, 0)[0]! / exact - 1);
    });

    for (const order of ordersOf(errors)) expect(order).toBeGreaterThan(1.9);
  });
});

// D, l, d in µm, Rm in kΩ·cm², Ri in Ω·cm, Cm in µF/cm².
const cells = [
  {
    like: 'layer 5 pyramidal',
    D: 20,
    l: 1000,
    d: 8,
    Rm: 15,
    Ri: 100,
    Cm: 1,
    R: 62.7,
    C: 263.9,
    tipR: 63.6,
    down: 0.854,
    up: 0.841,
  },
  {
    like: 'CA1 pyramidal',
    D: 15,
    l: 700,
    d: 9,
    Rm: 22,
    Ri: 180,
    Cm: 1,
    R: 113.39,
    C: 205.0,
    tipR: 114.1,
    down: 0.917,
    up: 0.912,
  },
  {
    like: 'fast interneuron',
    D: 15,
    l: 400,
    d: 4.8,
    Rm: 9,
    Ri: 170,
    Cm: 0.9,
    R: 143.34,
    C: 60.6,
    tipR: 147.3,
    down: 0.886,
    up: 0.863,
  },
  {
    like: 'granule',
    D: 10,
    l: 260,
    d: 16.9,
    Rm: 16.8,
    Ri: 300,
    Cm: 0.9,
    R: 120.1,
    C: 127.1,
    tipR: 120.2,
    down: 0.986,
    up: 0.985,
  },
  {
    like: 'Purkinje',
    D: 25,
    l: 500,
    d: 80,
    Rm: 122,
    Ri: 115,
    Cm: 0.77,
    R: 95.63,
    C: 982.7,
    tipR: 95.6,
    down: 0.999,
    up: 0.999,
  },
  {
    like: 'motoneurone',
    D: 30,
    l: 1480,
    d: 20,
    Rm: 5.3,
    Ri: 87,
    Cm: 2.4,
    R: 6.75,
    C: 2299.6,
    tipR: 6.9,
    down: 0.724,
    up: 0.711,
  },
  {
    like: 'thalamic relay',
    D: 20,
    l: 300,
    d: 25,
    Rm: 26.4,
    Ri: 173,
    Cm: 0.88,
    R: 106.69,
    C: 218.4,
    tipR: 106.7,
    down: 0.995,
    up: 0.995,
  },
  {
    like: 'cerebellar granule',
    D: 6,
    l: 15,
    d: 2.5,
    Rm: 4,
    Ri: 100,
    Cm: 1,
    R: 1732.56,
    C: 2.3,
    tipR: 1734.1,
    down: 1,
    up: 0.999,
  },
];

describe('sphere with one sealed cylinder: Rin = 1/(Gs + G∞·tanh L), sizes of eight kinds of cell', () => {
  it.each(cells)('a cell like a $like measures as in closed form at the default grid', (c) => {
    const shape: ShapeSource = {
      kind: 'generator',
      generator: { kind: 'ball-and-stick', somaDiameter_um: c.D, stickDiameter_um: c.d, stickLength_um: c.l },
    };
    const grid = cutGrid(passiveCell(shape, { Rm_kOhm_cm2: c.Rm, Ri_Ohm_cm: c.Ri, Cm_uF_cm2: c.Cm }), []);
    const tip = grid.count - 1;
    const fromSoma = steadyVoltages(grid, 0);
    const fromTip = steadyVoltages(grid, tip);

    // Discretisation: 0.5 % is asked for, 0.1 % was measured; the printed values carry rounding of their own.
    expect(Math.abs(fromSoma[0]! / (c.R * 1e6) - 1)).toBeLessThan(1.2e-3);
    expect(Math.abs(fromTip[tip]! / (c.tipR * 1e6) - 1)).toBeLessThan(8e-3);
    expect(Math.abs(fromSoma[tip]! / fromSoma[0]! - c.down)).toBeLessThan(1e-3);
    expect(Math.abs(fromTip[0]! / fromTip[tip]! - c.up)).toBeLessThan(1e-3);
    // A printed capacitance has one decimal.
    expect(Math.abs(total(grid.capacitance) * 1e12 - c.C)).toBeLessThan(0.06);
  });
});
