// Traub RD et al. (2003), J Neurophysiol 89:909–921; read in Aussel A, Fiebelkorn IC, Kastner S, Kopell NJ,
// Pittman-Polletta BR (2023), eLife 12:e67684, table 5, but for the opening rate of the calcium channel: from memory.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { kMTraub2003 } from '../../src-main/channels/k-m-traub-2003.ts';
import { caHighTraub2003 } from '../../src-main/channels/ca-high-traub-2003.ts';
import { closing, gateValues, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('k-m-traub-2003, computed', () => {
  // V (mV): m_inf, m_tau; τ in ms.
  it.each([
    [-100, 9.48533e-9, 4.21438],
    [-80, 1.57317e-6, 12.8021],
    [-65, 7.26926e-5, 29.4553],
    [-50, 0.00334074, 67.5545],
    [-40, 0.0407641, 113.32],
    [-20, 0.782071, 78.2071],
    [0, 0.955378, 48.6438],
    [20, 0.985121, 49.2726],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kMTraub2003, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 1, Q10 1 and reverses at -95 mV', () => {
    const { gates, reversal, measuredAt } = kMTraub2003;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[1, 1]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -95, measuredAt: null });
  });
});

describe('ca-high-traub-2003, computed', () => {
  // V (mV): m_inf, m_tau; τ in ms.
  it.each([
    [-100, 0.000456963, 0.548597],
    [-80, 0.00246214, 0.701503],
    [-65, 0.00908886, 0.883153],
    [-50, 0.0351233, 1.1735],
    [-40, 0.0882181, 1.46297],
    [-20, 0.4768, 2.10079],
    [-8.9, 0.81134, 1.8866],
    [0, 0.947946, 1.44167],
    [20, 0.998503, 0.835994],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(caHighTraub2003, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 2, Q10 1 and reverses at 125 mV', () => {
    const { gates, reversal, measuredAt } = caHighTraub2003;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[2, 1]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 125, measuredAt: null });
  });
});

const m = caHighTraub2003.gates[0]!;

describe('the calcium channel', () => {
  it('opens with depolarisation, unlike the sign printed in Aussel et al.', () => {
    for (let V = -150; V < 100; V += 1) expect(m.inf(V + 1)).toBeGreaterThan(m.inf(V));
  });
});

describe('singular points', () => {
  it('have the limit 0.1 per ms', () => {
    expect(closing(m, -8.9)).toBeCloseTo(0.1, 12);
  });

  it.each([1e-3, 1e-5, 1e-7, 1e-9])('have no step %s mV beside them', (away) => {
    // The value on both sides is the limit to first order: their mean is off by the curvature alone.
    expect((closing(m, -8.9 + away) + closing(m, -8.9 - away)) / 2 / 0.1 - 1).toBeCloseTo(0, 7);
  });
});
