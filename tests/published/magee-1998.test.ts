// Magee JC (1998), Dendritic hyperpolarization-activated currents modify the integrative properties of hippocampal CA1
// pyramidal neurons, J Neurosci 18:7613–7624; fit as in Poolos NP, Migliore M, Johnston D (2002), Nat Neurosci 5:767–774.
// From memory, in agreement with transcriptions.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { hMagee1998 } from '../../src-main/channels/h-magee-1998.ts';
import { gateValues, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('h-magee-1998, computed', () => {
  // V (mV): l_inf, l_tau; τ in ms.
  it.each([
    [-100, 0.904651, 35.1782],
    [-80, 0.437823, 46.3785],
    [-65, 0.106691, 38.455],
    [-50, 0.0179862, 23.211],
    [-40, 0.00522013, 15.0366],
    [-20, 0.000430557, 5.78527],
    [0, 3.53563e-5, 2.15051],
    [20, 2.90231e-6, 0.794033],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(hMagee1998, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 1, Q10 4.5 and reverses at -30 mV', () => {
    const { gates, reversal, measuredAt } = hMagee1998;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[1, 4.5]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -30, measuredAt: 33 });
  });
});
