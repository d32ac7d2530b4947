// Wang X-J, Buzsáki G (1996), Gamma oscillation by synaptic inhibition in a hippocampal interneuronal network model,
// J Neurosci 16:6402–6413. From memory, in agreement with quotations of its model section.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { naWangBuzsaki1996 } from '../../src-main/channels/na-wang-buzsaki-1996.ts';
import { kWangBuzsaki1996 } from '../../src-main/channels/k-wang-buzsaki-1996.ts';
import { lastRate, restOf, spikesUnder } from '../support/firing.ts';
import { gateValues, opening, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('na-wang-buzsaki-1996, computed', () => {
  // V (mV): m_inf, h_inf, h_tau; τ in ms.
  it.each([
    [-100, 0.000265081, 0.998697, 0.349419],
    [-80, 0.00414311, 0.974574, 0.926879],
    [-65, 0.0289055, 0.804579, 1.61993],
    [-50, 0.158052, 0.319912, 1.36358],
    [-40, 0.369217, 0.109488, 0.769423],
    [-35, 0.500649, 0.0626159, 0.565009],
    [-20, 0.816659, 0.0149474, 0.285533],
    [0, 0.961965, 0.00406922, 0.211299],
    [20, 0.991566, 0.00142656, 0.201358],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(naWangBuzsaki1996, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 3, 1, Q10 1, 1 and reverses at 55 mV', () => {
    const { gates, reversal, measuredAt } = naWangBuzsaki1996;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [3, 1],
      [1, 1],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 55, measuredAt: null });
  });
});

describe('k-wang-buzsaki-1996, computed', () => {
  // V (mV): n_inf, n_tau; τ in ms.
  it.each([
    [-100, 0.00355899, 0.791709],
    [-80, 0.0232714, 0.996463],
    [-65, 0.0825536, 1.12901],
    [-50, 0.231009, 1.14148],
    [-40, 0.380342, 1.04229],
    [-34, 0.475484, 0.950968],
    [-20, 0.667408, 0.718324],
    [0, 0.829851, 0.471857],
    [20, 0.906173, 0.334104],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kWangBuzsaki1996, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 4, Q10 1 and reverses at -90 mV', () => {
    const { gates, reversal, measuredAt } = kWangBuzsaki1996;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[4, 1]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -90, measuredAt: null });
  });
});

const m = naWangBuzsaki1996.gates[0]!;
const n = kWangBuzsaki1996.gates[0]!;

describe('singular points', () => {
  it('have the limits α_m = 1 per ms, seen as m∞ = 1/(1 + 4·exp(−25/18)), and α_n = 0.5 per ms', () => {
    expect(m.inf(-35)).toBeCloseTo(1 / (1 + 4 * Math.exp(-25 / 18)), 14);
    expect(opening(n, -34)).toBeCloseTo(0.5, 14);
  });

  it.each([1e-3, 1e-5, 1e-7, 1e-9])('have no step %s mV beside them', (away) => {
    expect((m.inf(-35 + away) + m.inf(-35 - away)) / 2 - m.inf(-35)).toBeCloseTo(0, 8);
    expect((opening(n, -34 + away) + opening(n, -34 - away)) / 2 - 0.5).toBeCloseTo(0, 8);
  });
});

describe('the whole membrane, 1 µF/cm², leak 0.1 mS/cm² at −65 mV (computed, variable steps at 1e-8)', () => {
  const membrane = {
    channels: { [naWangBuzsaki1996.name]: 35, [kWangBuzsaki1996.name]: 9 },
    reversals: { [naWangBuzsaki1996.name]: 55, [kWangBuzsaki1996.name]: -90 },
    leak: { conductance: 0.1, reversal: -65 },
    temperature: 22,
  };

  it('rests at −64.018 mV', () => {
    expect(restOf(membrane)).toBeCloseTo(-64.018, 3);
  });

  it.each([
    [0.5, 32.22],
    [1, 59.7],
    [2, 101.79],
    [5, 189.61],
  ])('fires steadily under %s µA/cm² at %s Hz, its sodium activation instantaneous', (density, rate) => {
    // Measured: 0.06 % of time discretisation at steps of 12.5 µs, a quarter of it here.
    expect(lastRate(spikesUnder(membrane, density, 400, 6.25e-6)) / rate - 1).toBeCloseTo(0, 3);
  });
});
