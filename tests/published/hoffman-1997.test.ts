// Hoffman DA, Magee JC, Colbert CM, Johnston D (1997), K+ channel regulation of signal propagation in dendrites of
// hippocampal pyramidal neurons, Nature 387:869–875; formulas in Migliore M, Hoffman DA, Magee JC, Johnston D (1999),
// J Comput Neurosci 7:5–15. From memory, in agreement with several transcriptions.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { kAProximalHoffman1997 } from '../../src-main/channels/k-a-proximal-hoffman-1997.ts';
import { kADistalHoffman1997 } from '../../src-main/channels/k-a-distal-hoffman-1997.ts';
import { gateValues, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('k-a-proximal-hoffman-1997, computed', () => {
  // V (mV): n_inf, n_tau, l_inf, l_tau; τ in ms.
  it.each([
    [-100, 2.89856e-5, 0.1, 0.993106, 2.0],
    [-80, 0.000190645, 0.1, 0.937674, 2.0],
    [-65, 0.000796157, 0.137224, 0.734316, 2.0],
    [-50, 0.00420071, 0.289507, 0.336763, 2.0],
    [-40, 0.0210289, 0.592053, 0.140959, 2.6],
    [-20, 0.145311, 1.31129, 0.0168481, 7.8],
    [0, 0.34946, 1.67494, 0.00178651, 13.0],
    [20, 0.624412, 1.60777, 0.000186875, 18.2],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kAProximalHoffman1997, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 1, 1, Q10 5, 1 and reverses at -90 mV', () => {
    const { gates, reversal, measuredAt } = kAProximalHoffman1997;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [1, 5],
      [1, 1],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -90, measuredAt: 35 });
  });
});

describe('k-a-distal-hoffman-1997, computed', () => {
  // V (mV): n_inf, n_tau, l_inf, l_tau; τ in ms.
  it.each([
    [-100, 2.93148e-5, 0.1, 0.993106, 2.0],
    [-80, 0.000241634, 0.1, 0.937674, 2.0],
    [-65, 0.00119157, 0.1, 0.734316, 2.0],
    [-50, 0.00706114, 0.1, 0.336763, 2.0],
    [-40, 0.0330069, 0.209799, 0.140959, 2.6],
    [-20, 0.214064, 0.605303, 0.0168481, 7.8],
    [0, 0.516941, 0.857233, 0.00178651, 13.0],
    [20, 0.805853, 0.787638, 0.000186875, 18.2],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kADistalHoffman1997, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 1, 1, Q10 5, 1 and reverses at -90 mV', () => {
    const { gates, reversal, measuredAt } = kADistalHoffman1997;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [1, 5],
      [1, 1],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -90, measuredAt: 35 });
  });
});

describe('the measured curves', () => {
  it('are half active at 11 mV with a slope near 18 mV and half inactivated at −56 mV (table of the paper, second-hand)', () => {
    const [n, l] = kAProximalHoffman1997.gates;
    expect(n!.inf(11)).toBe(0.5);
    // Slope of a Boltzmann: 1/(4·d inf/dV) at its middle. Printed without decimals.
    expect(Math.round(1 / (4 * (n!.inf(11.01) - n!.inf(10.99)) * 50))).toBe(18);
    expect(l!.inf(-56)).toBe(0.5);
  });
});

describe('the floors of the time constants', () => {
  it('are 0.1 ms for activation and 2 ms for inactivation, met without a jump', () => {
    for (const { gates } of [kAProximalHoffman1997, kADistalHoffman1997]) {
      expect(gates[0]!.tau(-100)).toBe(0.1);
      expect(gates[1]!.tau(-150)).toBe(2);
      // 0.26·(V + 50) is 2 at −42.31 mV.
      expect(gates[1]!.tau(-50 + 2 / 0.26 + 1e-9)).toBeCloseTo(2, 8);
    }
  });
});
