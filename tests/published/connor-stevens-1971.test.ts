// Connor JA, Stevens CF (1971), Prediction of repetitive firing behaviour from voltage clamp data on an isolated neurone
// soma, J Physiol 213:31–53; Connor JA, Walter D, McKown R (1977), Biophys J 18:81–102; constants as collected in Dayan P,
// Abbott LF (2001), Theoretical Neuroscience, ch. 6 (read in a textbook chapter that restates them; titles from memory).
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { naConnorStevens1971 } from '../../src-main/channels/na-connor-stevens-1971.ts';
import { kConnorStevens1971 } from '../../src-main/channels/k-connor-stevens-1971.ts';
import { kAConnorStevens1971 } from '../../src-main/channels/k-a-connor-stevens-1971.ts';
import { lastRate, restOf, spikesUnder } from '../support/firing.ts';
import { gateValues, opening, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('na-connor-stevens-1971, computed', () => {
  // V (mV): m_inf, m_tau, h_inf, h_tau; τ in ms.
  it.each([
    [-100, 0.000125649, 0.0053104, 0.999709, 0.279143],
    [-80, 0.00202558, 0.0161009, 0.994192, 0.754601],
    [-65, 0.0148108, 0.0365732, 0.947836, 1.52301],
    [-50, 0.0905985, 0.0776804, 0.663893, 2.25833],
    [-40, 0.244448, 0.112485, 0.319912, 1.79418],
    [-29.7, 0.500649, 0.13175, 0.10584, 0.993457],
    [-20, 0.72861, 0.122736, 0.0369293, 0.562992],
    [0, 0.942341, 0.0792128, 0.00734559, 0.304405],
    [20, 0.987557, 0.0519274, 0.0023827, 0.268404],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(naConnorStevens1971, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 3, 1, Q10 3, 3 and reverses at 55 mV', () => {
    const { gates, reversal, measuredAt } = naConnorStevens1971;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [3, 3],
      [1, 3],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 55, measuredAt: 18.5 });
  });
});

describe('k-connor-stevens-1971, computed', () => {
  // V (mV): n_inf, n_tau; τ in ms.
  it.each([
    [-100, 0.0108728, 2.27416],
    [-80, 0.0634821, 2.76477],
    [-65, 0.189226, 2.88717],
    [-50, 0.407433, 2.54531],
    [-45.7, 0.475484, 2.37742],
    [-40, 0.560848, 2.13749],
    [-20, 0.776717, 1.39547],
    [0, 0.881115, 0.954036],
    [20, 0.931312, 0.707768],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kConnorStevens1971, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 4, Q10 3 and reverses at -72 mV', () => {
    const { gates, reversal, measuredAt } = kConnorStevens1971;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[4, 3]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -72, measuredAt: 18.5 });
  });
});

describe('k-a-connor-stevens-1971, computed', () => {
  // V (mV): a_inf, a_tau, b_inf, b_tau; τ in ms.
  it.each([
    [-100, 0.394613, 1.40453, 0.853875, 3.80472],
    [-80, 0.481492, 1.25209, 0.553428, 3.56095],
    [-65, 0.555725, 1.07013, 0.227954, 3.16354],
    [-50, 0.636236, 0.857065, 0.0386886, 2.579],
    [-40, 0.691901, 0.723886, 0.00669389, 2.17431],
    [-20, 0.801335, 0.529265, 7.14371e-5, 1.59705],
    [0, 0.895802, 0.430761, 3.87306e-7, 1.35328],
    [20, 0.96306, 0.389157, 1.70306e-9, 1.27354],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kAConnorStevens1971, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 3, 1, Q10 3, 3 and reverses at -75 mV', () => {
    const { gates, reversal, measuredAt } = kAConnorStevens1971;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [3, 3],
      [1, 3],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -75, measuredAt: 18.5 });
  });
});

const m = naConnorStevens1971.gates[0]!;
const n = kConnorStevens1971.gates[0]!;
describe('singular points', () => {
  it('have the limits 3.8 and 0.2 per ms', () => {
    expect(opening(m, -29.7)).toBeCloseTo(3.8, 12);
    expect(opening(n, -45.7)).toBeCloseTo(0.2, 12);
  });

  it.each([1e-3, 1e-5, 1e-7, 1e-9])('have no step %s mV beside them', (away) => {
    // The value on both sides is the limit to first order: their mean is off by the curvature alone.
    expect((opening(m, -29.7 + away) + opening(m, -29.7 - away)) / 2 / 3.8 - 1).toBeCloseTo(0, 7);
    expect((opening(n, -45.7 + away) + opening(n, -45.7 - away)) / 2 / 0.2 - 1).toBeCloseTo(0, 7);
  });
});

describe('the A-type activation', () => {
  it('passes 1 between 40 and 98 mV, by 1.37 % at 65.5 mV, as published (computed)', () => {
    const a = kAConnorStevens1971.gates[0]!;
    expect([39, 41, 97, 99].map((V) => a.inf(V) > 1)).toEqual([false, true, true, false]);
    expect(a.inf(65.5)).toBeCloseTo(1.0137, 4);
    expect(Math.max(...Array.from({ length: 251 }, (_, i) => a.inf(i - 150)))).toBeLessThan(1.01375);
  });
});

describe('the whole membrane, 1 µF/cm², leak 0.3 mS/cm² at −17 mV, 18.5 °C (computed, variable steps at 1e-8)', () => {
  const membrane = {
    channels: { [naConnorStevens1971.name]: 120, [kConnorStevens1971.name]: 20, [kAConnorStevens1971.name]: 47.7 },
    reversals: { [naConnorStevens1971.name]: 55, [kConnorStevens1971.name]: -72, [kAConnorStevens1971.name]: -75 },
    leak: { conductance: 0.3, reversal: -17 },
    temperature: 18.5,
  };

  it('rests at −67.975 mV', () => {
    // Printed to 0.001 mV.
    expect(restOf(membrane)).toBeCloseTo(-67.975, 3);
  });

  it('is silent at 8 µA/cm² and fires late and slowly at 9: its first spike at 66.23 ms', () => {
    expect(spikesUnder(membrane, 8, 150)).toEqual([]);
    // Just above the least current that fires, where the latency depends on everything.
    expect(spikesUnder(membrane, 9, 100)[0]! / 66.23 - 1).toBeCloseTo(0, 2);
  });

  it.each([
    [10, 34.07],
    [15, 91.09],
    [20, 132.3],
  ])('fires steadily under %s µA/cm² at %s Hz', (density, rate) => {
    expect(lastRate(spikesUnder(membrane, density, 400)) / rate - 1).toBeCloseTo(0, 3);
  });
});
