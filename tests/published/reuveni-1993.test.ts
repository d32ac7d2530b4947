// Reuveni I, Friedman A, Amitai Y, Gutnick MJ (1993), J Neurosci 13:4609–4621; unscaled at 36 °C as in Pospischil M et al.
// (2008), Biol Cybern 99:427–441. From memory, in agreement with two transcriptions.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { caLReuveni1993 } from '../../src-main/channels/ca-l-reuveni-1993.ts';
import { gateValues, opening, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('ca-l-reuveni-1993, computed', () => {
  // V (mV): q_inf, q_tau, r_inf, r_tau; τ in ms.
  it.each([
    [-100, 4.45516e-9, 0.244458, 0.897317, 344.633],
    [-80, 2.0254e-6, 0.792752, 0.750291, 429.892],
    [-65, 0.000181753, 1.9154, 0.580751, 449.167],
    [-50, 0.0136168, 4.56653, 0.398206, 415.732],
    [-40, 0.167618, 6.93954, 0.293428, 374.168],
    [-27, 0.789179, 3.77598, 0.190825, 315.586],
    [-20, 0.925201, 2.02226, 0.150785, 286.84],
    [0, 0.992384, 0.667724, 0.079137, 224.584],
    [20, 0.998641, 0.38632, 0.0446619, 189.084],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(caLReuveni1993, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 2, 1, Q10 1, 1 and reverses at 120 mV', () => {
    const { gates, reversal, measuredAt } = caLReuveni1993;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [2, 1],
      [1, 1],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 120, measuredAt: 36 });
  });
});

const q = caLReuveni1993.gates[0]!;
describe('singular points', () => {
  it('have the limit 0.209 per ms', () => {
    expect(opening(q, -27)).toBeCloseTo(0.209, 12);
  });

  it.each([1e-3, 1e-5, 1e-7, 1e-9])('have no step %s mV beside them', (away) => {
    // The value on both sides is the limit to first order: their mean is off by the curvature alone.
    expect((opening(q, -27 + away) + opening(q, -27 - away)) / 2 / 0.209 - 1).toBeCloseTo(0, 7);
  });
});
