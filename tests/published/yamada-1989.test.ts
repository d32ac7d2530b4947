// Yamada WM, Koch C, Adams PR (1989), Multiple channels and calcium dynamics, in Methods in Neuronal Modeling (Koch C,
// Segev I, eds), MIT Press, pp 97–134; as used in Pospischil M et al. (2008), Biol Cybern 99:427–441. Steady state and form
// of the time constant read in course notes on those cells; 1000 ms, the chapter's title and Q10 from memory.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { kMYamada1989 } from '../../src-main/channels/k-m-yamada-1989.ts';
import { gateValues, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('k-m-yamada-1989, computed', () => {
  // V (mV): p_inf, p_tau; τ in ms.
  it.each([
    [-100, 0.00150118, 38.5828],
    [-80, 0.0109869, 101.672],
    [-65, 0.0474259, 191.644],
    [-50, 0.182426, 272.049],
    [-40, 0.377541, 259.466],
    [-20, 0.817574, 134.076],
    [0, 0.970688, 52.1813],
    [20, 0.99593, 19.3481],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kMYamada1989, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 1, Q10 2.3 and reverses at -90 mV', () => {
    const { gates, reversal, measuredAt } = kMYamada1989;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[1, 2.3]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -90, measuredAt: 36 });
  });
});
