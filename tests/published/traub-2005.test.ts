// Traub RD et al. (2005), J Neurophysiol 93:2194–2232, after Martina M, Jonas P (1997), J Physiol 505:593–603; read in
// Aussel A, Fiebelkorn IC, Kastner S, Kopell NJ, Pittman-Polletta BR (2023), eLife 12:e67684, table 1.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { naTraub2005 } from '../../src-main/channels/na-traub-2005.ts';
import { kTraub2005 } from '../../src-main/channels/k-traub-2005.ts';
import { gateValues, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('na-traub-2005, computed', () => {
  // V (mV): m_inf, h_inf, h_tau; τ in ms.
  it.each([
    [-100, 0.00142807, 0.977998, 1.2865],
    [-80, 0.0104567, 0.872721, 1.25043],
    [-65, 0.0452175, 0.627934, 1.17454],
    [-50, 0.175086, 0.293488, 1.0128],
    [-40, 0.365864, 0.140266, 0.84767],
    [-20, 0.809998, 0.0245487, 0.482408],
    [0, 0.969231, 0.003867, 0.261316],
    [20, 0.995722, 0.000598455, 0.181595],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(naTraub2005, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 3, 1, Q10 1, 1 and reverses at 50 mV', () => {
    const { gates, reversal, measuredAt } = naTraub2005;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [3, 1],
      [1, 1],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 50, measuredAt: null });
  });
});

describe('k-traub-2005, computed', () => {
  // V (mV): m_inf, m_tau; τ in ms.
  it.each([
    [-100, 0.000866657, 0.250537],
    [-80, 0.00636852, 0.253967],
    [-65, 0.0279226, 0.267777],
    [-50, 0.114052, 0.329673],
    [-40, 0.259225, 0.466574],
    [-20, 0.721115, 1.85028],
    [0, 0.950263, 1.85028],
    [20, 0.992966, 0.466574],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kTraub2005, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 4, Q10 1 and reverses at -95 mV', () => {
    const { gates, reversal, measuredAt } = kTraub2005;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[4, 1]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -95, measuredAt: null });
  });
});

describe('the corner of τ_m of the potassium gate', () => {
  it('is at −10 mV, 4.6 ms, the same on both sides', () => {
    const m = kTraub2005.gates[0]!;
    expect(m.tau(-10)).toBeCloseTo(0.25 + 4.35, 14);
    expect(m.tau(-10 + 3)).toBeCloseTo(m.tau(-10 - 3), 14);
  });
});
