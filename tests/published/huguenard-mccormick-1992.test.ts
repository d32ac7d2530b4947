// Huguenard JR, McCormick DA (1992), Simulation of the currents involved in rhythmic oscillations in thalamic relay
// neurons, J Neurophysiol 68:1373–1383; data of the h-current: McCormick DA, Pape H-C (1990), J Physiol 431:291–318.
// The T-type from memory, in agreement with transcriptions; the h-current read in Aussel A et al. (2023), eLife 12:e67684.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { caTHuguenardMccormick1992 } from '../../src-main/channels/ca-t-huguenard-mccormick-1992.ts';
import { hHuguenardMccormick1992 } from '../../src-main/channels/h-huguenard-mccormick-1992.ts';
import { gateValues, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('ca-t-huguenard-mccormick-1992, computed', () => {
  // V (mV): m_inf, m_tau, h_inf, h_tau; τ in ms.
  it.each([
    [-100, 0.00134113, 7.64911, 0.985936, 254.816],
    [-80, 0.0327012, 14.1142, 0.320821, 235.127],
    [-65, 0.275331, 11.1336, 0.0109869, 77.6383],
    [-50, 0.810247, 5.97015, 0.00026119, 39.8959],
    [-40, 0.955405, 3.7809, 2.14449e-5, 32.5897],
    [-20, 0.998149, 1.67892, 1.44498e-7, 28.6832],
    [0, 0.999926, 0.967908, 9.7362e-10, 28.1017],
    [20, 0.999997, 0.730614, 6.5602e-12, 28.0151],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(caTHuguenardMccormick1992, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 2, 1, Q10 5, 3 and reverses at 120 mV', () => {
    const { gates, reversal, measuredAt } = caTHuguenardMccormick1992;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [2, 5],
      [1, 3],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 120, measuredAt: 24 });
  });
});

describe('h-huguenard-mccormick-1992, computed', () => {
  // V (mV): m_inf, m_tau; τ in ms.
  it.each([
    [-100, 0.989496, 378.385],
    [-80, 0.712814, 986.477],
    [-65, 0.139652, 574.213],
    [-50, 0.0105038, 214.367],
    [-40, 0.00172013, 106.961],
    [-20, 4.53979e-5, 26.3622],
    [0, 1.1962e-6, 6.48828],
    [20, 3.15174e-8, 1.5968],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(hHuguenardMccormick1992, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 1, Q10 3 and reverses at -43 mV', () => {
    const { gates, reversal, measuredAt } = hHuguenardMccormick1992;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[1, 3]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -43, measuredAt: 35 });
  });
});

describe('the branches of τ_h of the T-type', () => {
  it('meet at V = −82 mV, the shift of +2 mV counted, with a jump from 334 to 279 ms, as published', () => {
    const h = caTHuguenardMccormick1992.gates[1]!;
    expect(Math.round(h.tau(-82 - 1e-9))).toBe(334);
    expect(Math.round(h.tau(-82))).toBe(279);
  });
});

describe('the h-current', () => {
  it('is half open at −75 mV with a slope of 5.5 mV (Aussel et al. 2023, table 1)', () => {
    const m = hHuguenardMccormick1992.gates[0]!;
    expect(m.inf(-75)).toBe(0.5);
    expect(m.inf(-75 + 5.5) * (1 + Math.E)).toBeCloseTo(1, 14);
  });
});
