// Ausborn J et al. (2018), J Neurophysiol 119:96–117, table 1 (read), in the form of Butera RJ, Rinzel J, Smith JC (1999),
// Models of respiratory rhythm generation in the pre-Bötzinger complex. I, J Neurophysiol 82:382–397.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { naPersistentAusborn2018 } from '../../src-main/channels/na-persistent-ausborn-2018.ts';
import { gateValues, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('na-persistent-ausborn-2018, computed', () => {
  // V (mV): m_inf, h_inf, h_tau; τ in ms.
  it.each([
    [-100, 4.53979e-5, 0.977023, 1198.65],
    [-80, 0.00127102, 0.889273, 2510.35],
    [-65, 0.0152672, 0.697059, 3676.24],
    [-50, 0.158869, 0.397315, 3914.74],
    [-40, 0.5, 0.2227, 3328.47],
    [-20, 0.965555, 0.0513358, 1765.45],
    [0, 0.998729, 0.0101174, 800.6],
    [20, 0.999955, 0.00192673, 350.818],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(naPersistentAusborn2018, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 1, 1, Q10 1, 1 and reverses at 50 mV', () => {
    const { gates, reversal, measuredAt } = naPersistentAusborn2018;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [1, 1],
      [1, 1],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 50, measuredAt: null });
  });
});

describe('table 1', () => {
  it('is half active at −40 mV, half inactivated at −55 mV, and slowest there, 4000 ms', () => {
    const [m, h] = naPersistentAusborn2018.gates;
    expect([m!.inf(-40), h!.inf(-55), h!.tau(-55)]).toEqual([0.5, 0.5, 4000]);
  });
});
