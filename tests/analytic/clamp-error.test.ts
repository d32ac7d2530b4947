// Closed forms of clamp error: the sealed cable, the sphere behind an access resistance, two compartments by hand.
// Cable: V(X)/V0 = cosh(L−X)/cosh(L), Rall (1959), Exp Neurol 1:491–527 (from memory). Access: V = Vc − I·Rs, Ohm's law.
import { beforeAll, describe, expect, it } from 'vitest';
import { gatherForecast } from '../../src-main/forecast/gather.ts';
import { rehearseSweep } from '../../src-main/forecast/rehearse.ts';
import type { ClampForecast, Forecast } from '../../src-main/contract/results.ts';
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import { preparePlan, type PreparedPlan } from '../../src-main/solver/prepare.ts';
import { ballAndStick, planOf, sketch, soma } from '../support/plans.ts';
import { hold, step } from '../support/protocols.ts';

function forecastOf(plan: PlanDocument): { prepared: PreparedPlan; forecast: Forecast; clamp: ClampForecast } {
  const prepared = preparePlan(plan);
  const sweeps = Array.from({ length: prepared.laidOut.count }, (_, i) => rehearseSweep(prepared, i));
  const forecast = gatherForecast(prepared, sweeps);
  if (forecast.clamp === null) throw new Error('no clamp in the forecast');
  return { prepared, forecast, clamp: forecast.clamp };
}

describe('a sealed cable clamped at its end (cylinder of λ = 1 mm, L = 1)', () => {
  const length = 1000;
  let prepared: PreparedPlan;
  let clamp: ClampForecast;
  beforeAll(() => {
    const plan = planOf({
      // d = 4 µm, Rm = 15 kΩ·cm², Ri = 150 Ω·cm: λ = √(d·Rm/4Ri) = 1000 µm. An ideal clamp at the soma makes it no load.
      cell: ballAndStick({ soma_um: 20, stick_um: 4, length_um: length }, { Rm: 15_000, Ri: 150, Cm: 1, rest_mV: -65 }),
      pipettes: [{ letter: 'A', site: soma, mode: 'voltage clamp' }],
      lanes: [{ holding: -65, blocks: [hold('before', 5), step('test', 120, -45), hold('after', 5)] }],
      plan: { tolerance: { unit: 'mV', value: 5 } },
    });
    ({ prepared, clamp } = forecastOf(plan));
  });

  it('steady error is ΔV·(cosh(L−X)/cosh(L) − 1) at every centre to 0.5 % of the step, default grid', () => {
    const { grid } = prepared;
    const { steady_mV } = clamp.sweeps[0]!;
    for (let k = 0; k < grid.count; k += 1) {
      const X = grid.distance[k]! / 1e-3;
      const exact = 20 * (Math.cosh(1 - X) / Math.cosh(1) - 1);
      expect(Math.abs(steady_mV[k]! - exact), `at ${X} λ`).toBeLessThan(0.005 * 20);
    }
  });

  it('trust distance is where 20·(1 − cosh(L−X)/cosh(L)) reaches the tolerance, to 0.5 % of the length', () => {
    const exact = 1 - Math.acosh(0.75 * Math.cosh(1));
    expect(Math.abs(clamp.trustDistance_um! / length - exact)).toBeLessThan(0.005);
  });

  it('reach is the membrane up to there and the soma, whatever the compartments', () => {
    const trusted = Math.PI * 4 * (clamp.trustDistance_um ?? NaN);
    const somaArea = Math.PI * 20 ** 2;
    const whole = Math.PI * 4 * length + somaArea;
    // Both are read off the same straight lines between centres, and a cylinder has its membrane evenly: rounding is left.
    expect(clamp.reach).toBeCloseTo((trusted + somaArea) / whole, 12);
    const [inSoma, inStick] = clamp.reachByRegion;
    expect(inSoma).toMatchObject({ region: 'soma', reach: 1 });
    expect(inSoma!.area_um2).toBeCloseTo(somaArea, 6);
    expect(inStick!.reach).toBeCloseTo((clamp.reach * whole - somaArea) / (Math.PI * 4 * length), 9);
  });

  it('nothing is left of the access part under an ideal clamp', () => {
    expect(clamp.accessError_mV).toBe(0);
    expect(clamp.sweeps[0]!.accessPart_mV).toBe(0);
  });

  it('far compartments settle later, and those that never come within the tolerance say so', () => {
    const { settling_ms, steady_mV } = clamp.sweeps[0]!;
    settling_ms.forEach((time, k) => expect(Number.isNaN(time)).toBe(Math.abs(steady_mV[k]!) > 5));
    const settled = settling_ms.filter((time) => !Number.isNaN(time));
    for (let k = 2; k < settled.length; k += 1) expect(settled[k]!).toBeGreaterThan(settled[k - 1]!);
  });
});

describe('a sphere behind an access resistance', () => {
  // 20 µm, Rm 10 kΩ·cm²: R = Rm/πd² = 795.8 MΩ, C = 12.57 pF.
  const area_um2 = Math.PI * 400;
  const R_MOhm = 1e4 / (area_um2 * 1e-8) / 1e6;
  const C_pF = area_um2 * 0.01;
  const Rs_MOhm = 50;
  const plan = (tolerance: unknown): PlanDocument =>
    planOf({
      cell: sketch([{ name: 'ball', area_um2, channels: { passive: 0.1 } }]),
      pipettes: [{ letter: 'A', site: { compartment: 'ball' }, mode: 'voltage clamp', accessResistance_MOhm: Rs_MOhm }],
      lanes: [{ holding: -60, blocks: [hold('before', 2), step('test', 40, -20), hold('after', 2)] }],
      protocol: { ladders: [{ lane: 'A', block: 'test', number: 'level', rungs: { list: [-60, -20, 20] } }] },
      plan: { tolerance },
    });

  it('the access error is exactly I·Rs = (V_rest − V_c)·Rs/(R + Rs)', () => {
    const { clamp, forecast } = forecastOf(plan({ unit: 'mV', value: 5 }));
    clamp.sweeps.forEach(({ level_mV, accessPart_mV }) => {
      const exact = ((-70 - level_mV!) * Rs_MOhm) / (R_MOhm + Rs_MOhm);
      // 40 ms are 64 time constants; what is left is rounding.
      expect(accessPart_mV).toBeCloseTo(exact, 9);
    });
    expect(clamp.accessError_mV).toBeCloseTo((-90 * Rs_MOhm) / (R_MOhm + Rs_MOhm), 9);
    const bandwidth = 1 / (2 * Math.PI * Rs_MOhm * 1e6 * C_pF * 1e-12);
    expect(forecast.pipettes[0]!.clampBandwidth_Hz! / bandwidth).toBeCloseTo(1, 9);
  });

  it('reach is all or nothing and the worst sweep is the one that fails', () => {
    const { clamp } = forecastOf(plan({ unit: 'mV', value: 5 }));
    // Errors 0.59, 2.96 and 5.32 mV.
    expect(clamp.sweeps.map(({ reach }) => reach)).toEqual([1, 1, 0]);
    expect(clamp).toMatchObject({ reach: 0, worstSweep: 2, trustDistance_um: 0 });
  });

  it('settling is τ·ln(Δ/(tol − |steady|·sign)) with τ = C·(R ∥ Rs)', () => {
    const { clamp } = forecastOf(plan({ unit: 'mV', value: 5 }));
    const tau_ms = (C_pF * 1e-12 * ((R_MOhm * Rs_MOhm) / (R_MOhm + Rs_MOhm)) * 1e6 * 1e3) / 1;
    const share = Rs_MOhm / (R_MOhm + Rs_MOhm);
    // From the steady error at −60 to that at −20; the step adds −40 mV at once.
    const steady = -50 * share;
    const first = -10 * share - 40;
    const exact = tau_ms * Math.log((first - steady) / (-5 - steady));
    // The chord between two samples 20 µs apart: (20 µs/τ)²/8 of a sample, and the solver's second order.
    expect(Math.abs(clamp.sweeps[1]!.settling_ms[0]! - exact)).toBeLessThan(0.002);
    expect(clamp.sweeps[1]!.worst_mV[0]).toBeCloseTo(first, 9);
    expect(clamp.sweeps[2]!.settling_ms[0]).toBeNaN();
  });

  it('settling counts from the block the window begins in, whichever edge the window hangs on', () => {
    const settled = (from: unknown): number[] => {
      const given = plan({ unit: 'mV', value: 5 });
      const to = { block: 'test', edge: 'end', offset_ms: 0 };
      const clampWindow = { lane: 'A', from, to } as PlanDocument['clampWindow'];
      return forecastOf({ ...given, ...(clampWindow && { clampWindow }) }).clamp.sweeps.map((s) => s.settling_ms[0]!);
    };
    const usual = settled({ block: 'test', edge: 'start', offset_ms: 0 });
    expect(usual[1]).toBeGreaterThan(0);
    expect(settled({ block: 'before', edge: 'end', offset_ms: 0 })).toEqual(usual);
    expect(settled({ block: 'after', edge: 'start', offset_ms: -3 })).toEqual(usual);
  });

  it('a tolerance in per cent is of |level − holding| and leaves the step of zero out', () => {
    const { clamp, forecast } = forecastOf(plan({ unit: '%', value: 7 }));
    // Errors of 2.96 of 40 mV (7.4 %) and 5.32 of 80 (6.65 %).
    expect(clamp.sweeps.map(({ sweep, reach }) => [sweep, reach])).toEqual([
      [1, 0],
      [2, 1],
    ]);
    expect(forecast.notes.join(' ')).toContain('left out of reach: sweep 1.');
  });
});

describe('two compartments by hand', () => {
  // Clamp in "here"; "there" hangs on g = 4 nS with a leak of 1 nS to −70 mV: V = (4·V_here − 70)/5.
  const cell = sketch(
    [
      { name: 'here', area_um2: 1000, channels: { passive: 0.2 } }, // 2 nS
      { name: 'there', area_um2: 500, channels: { passive: 0.2 } }, // 1 nS
    ],
    [['here', 'there', 4]],
  );
  const plan = (access: number): PlanDocument =>
    planOf({
      cell,
      pipettes: [{ letter: 'A', site: { compartment: 'here' }, mode: 'voltage clamp', accessResistance_MOhm: access }],
      lanes: [{ holding: -60, blocks: [hold('before', 1), step('test', 200, 0), hold('after', 1)] }],
      plan: { tolerance: { unit: 'mV', value: 10 } },
    });

  it('ideal clamp: the far one stands at −14 mV, error −14, and reach is 2/3', () => {
    const { clamp } = forecastOf(plan(0));
    expect([...clamp.sweeps[0]!.steady_mV]).toEqual([0, expect.closeTo(-14, 9)]);
    expect(clamp.reach).toBeCloseTo(2 / 3, 12);
    expect(clamp.sweeps[0]!.settling_ms[1]).toBeNaN();
  });

  it('through 100 MΩ: near and far by Kirchhoff', () => {
    // Far branch seen from here: 4·1/5 = 0.8 nS to −70; with 2 nS: 2.8 nS. 10 nS to 0 mV. V = −70·2.8/12.8.
    const { clamp } = forecastOf(plan(100));
    const here = (-70 * 2.8) / 12.8;
    expect(clamp.sweeps[0]!.accessPart_mV).toBeCloseTo(here, 9);
    expect(clamp.sweeps[0]!.steady_mV[1]).toBeCloseTo((4 * here - 70) / 5, 9);
  });
});
