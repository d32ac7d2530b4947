// Magistretti J, Alonso A (1999), Biophysical properties and slow voltage-dependent inactivation of a sustained sodium
// current in entorhinal cortex layer-II principal neurons, J Gen Physiol 114:491–509; form as in Hay E, Hill S, Schürmann F,
// Markram H, Segev I (2011), PLoS Comput Biol 7:e1002107. Formulas from memory; the abstract of 1999 read.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { naPersistentMagistrettiAlonso1999 } from '../../src-main/channels/na-persistent-magistretti-alonso-1999.ts';
import { gateValues, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('na-persistent-magistretti-alonso-1999, computed', () => {
  // V (mV): m_inf, m_tau, h_inf, h_tau; τ in ms.
  it.each([
    [-100, 3.34861e-5, 0.780374, 0.994059, 4183.39],
    [-80, 0.00258222, 1.14948, 0.95771, 5502.72],
    [-65, 0.0632304, 1.74377, 0.834795, 6472.76],
    [-64.4, 0.0714108, 1.7783, 0.826353, 6461.24],
    [-50, 0.637659, 2.90876, 0.529964, 5115.8],
    [-40, 0.939297, 3.34268, 0.293178, 4236.28],
    [-38, 0.959841, 3.26797, 0.253506, 4092.33],
    [-20, 0.999165, 1.68322, 0.0531511, 3065.1],
    [-17, 0.999565, 1.49176, 0.0399253, 2921.5],
    [0, 0.999989, 0.864966, 0.00753973, 2231.08],
    [20, 1.0, 0.568337, 0.00102709, 1707.15],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(naPersistentMagistrettiAlonso1999, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 3, 1, Q10 2.3, 2.3 and reverses at 50 mV', () => {
    const { gates, reversal, measuredAt } = naPersistentMagistrettiAlonso1999;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [3, 2.3],
      [1, 2.3],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 50, measuredAt: 21 });
  });
});

const [m, h] = naPersistentMagistrettiAlonso1999.gates;

describe('the abstract', () => {
  it('has inactivation half done about −49 mV, with time constants of 2.6 to 6.8 s', () => {
    // −48.8 mV in the fit: half a millivolt is its rounding.
    expect(h!.inf(-48.8)).toBe(0.5);
    expect(Math.abs(-48.8 + 49)).toBeLessThan(0.5);
    expect(h!.tau(-50) / 1e3).toBeCloseTo(5.1, 1);
    const tau = Array.from({ length: 71 }, (_, i) => h!.tau(i - 80) / 1e3);
    expect(Math.max(...tau)).toBeLessThan(6.8);
    expect(Math.min(...tau)).toBeGreaterThan(2.5);
  });
});

describe('singular points', () => {
  // Computed: 6/(0.182·6 + 0.124·6) ms; the others from the formula, the singular term by its limit.
  it.each([
    ['m', -38, 3.26797],
    ['h', -17, 2921.496],
    ['h', -64.4, 6461.239],
  ])('τ_%s is whole at %s mV', (gate, V, limit) => {
    const { tau } = gate === 'm' ? m! : h!;
    expect(tau(V) / limit - 1).toBeCloseTo(0, 5);
    for (const away of [1e-3, 1e-5, 1e-7, 1e-9])
      expect((tau(V + away) + tau(V - away)) / 2 / tau(V) - 1).toBeCloseTo(0, 7);
  });
});
