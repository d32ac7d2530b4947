// Kole MHP, Hallermann S, Stuart GJ (2006), Single Ih channels in pyramidal neuron dendrites, J Neurosci 26:1677–1687.
// Rates from memory, in agreement with three transcriptions.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { hKole2006 } from '../../src-main/channels/h-kole-2006.ts';
import { gateValues, opening, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('h-kole-2006, computed', () => {
  // V (mV): m_inf, m_tau; τ in ms.
  it.each([
    [-100, 0.273183, 77.2566],
    [-80, 0.0492233, 55.2301],
    [-65, 0.0110592, 36.5138],
    [-50, 0.00234502, 23.413],
    [-40, 0.00082065, 17.3346],
    [-20, 9.81344e-5, 9.48012],
    [0, 1.14703e-5, 5.18129],
    [20, 1.31824e-6, 2.83158],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(hKole2006, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 1, Q10 1 and reverses at -45 mV', () => {
    const { gates, reversal, measuredAt } = hKole2006;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[1, 1]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -45, measuredAt: 34 });
  });
});

const m = hKole2006.gates[0]!;
describe('singular points', () => {
  it('have the limit 0.00643·11.9 per ms', () => {
    expect(opening(m, -154.9)).toBeCloseTo(0.00643 * 11.9, 12);
  });

  it.each([1e-3, 1e-5, 1e-7, 1e-9])('have no step %s mV beside them', (away) => {
    // The value on both sides is the limit to first order: their mean is off by the curvature alone.
    expect((opening(m, -154.9 + away) + opening(m, -154.9 - away)) / 2 / (0.00643 * 11.9) - 1).toBeCloseTo(0, 7);
  });
});
