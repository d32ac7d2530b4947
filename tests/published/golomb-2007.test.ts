// Golomb D, Donner K, Shacham L, Shlosberg D, Amitai Y, Hansel D (2007), Mechanisms of firing patterns in fast-spiking
// cortical interneurons, PLoS Comput Biol 3:e156. Constants read there in part, formulas in Aussel A et al. (2023), eLife
// 12:e67684, table 4.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { naGolomb2007 } from '../../src-main/channels/na-golomb-2007.ts';
import { kKv3Golomb2007 } from '../../src-main/channels/k-kv3-golomb-2007.ts';
import { kDGolomb2007 } from '../../src-main/channels/k-d-golomb-2007.ts';
import { gateValues, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('na-golomb-2007, computed', () => {
  // V (mV): m_inf, h_inf, h_tau; τ in ms.
  it.each([
    [-100, 0.00134677, 0.998022, 14.0178],
    [-80, 0.00761822, 0.962269, 12.2758],
    [-65, 0.0275125, 0.731059, 8.93759],
    [-50, 0.094416, 0.224644, 4.74117],
    [-40, 0.1992, 0.061149, 2.72417],
    [-20, 0.58609, 0.00328068, 0.982233],
    [0, 0.889629, 0.00016631, 0.5937],
    [20, 0.97867, 8.40591e-6, 0.517794],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(naGolomb2007, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 3, 1, Q10 1, 1 and reverses at 50 mV', () => {
    const { gates, reversal, measuredAt } = naGolomb2007;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [3, 1],
      [1, 1],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 50, measuredAt: null });
  });
});

describe('k-kv3-golomb-2007, computed', () => {
  // V (mV): n_inf, n_tau; τ in ms.
  it.each([
    [-100, 2.54252e-6, 1.57814],
    [-80, 4.81483e-5, 2.67065],
    [-65, 0.000436933, 4.65889],
    [-50, 0.00395264, 8.77542],
    [-40, 0.0169762, 13.2747],
    [-20, 0.246448, 21.4429],
    [0, 0.860989, 10.3472],
    [20, 0.991547, 2.42032],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kKv3Golomb2007, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 2, Q10 1 and reverses at -90 mV', () => {
    const { gates, reversal, measuredAt } = kKv3Golomb2007;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[2, 1]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -90, measuredAt: null });
  });
});

describe('k-d-golomb-2007, computed', () => {
  // V (mV): a_inf, a_tau, b_inf, b_tau; τ in ms.
  it.each([
    [-100, 0.0758582, 2.0, 0.993307, 150.0],
    [-80, 0.182426, 2.0, 0.841131, 150.0],
    [-65, 0.320821, 2.0, 0.302941, 150.0],
    [-50, 0.5, 2.0, 0.0344452, 150.0],
    [-40, 0.622459, 2.0, 0.00669285, 150.0],
    [-20, 0.817574, 2.0, 0.000240312, 150.0],
    [0, 0.924142, 2.0, 8.57487e-6, 150.0],
    [20, 0.970688, 2.0, 3.05902e-7, 150.0],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kDGolomb2007, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 3, 1, Q10 1, 1 and reverses at -90 mV', () => {
    const { gates, reversal, measuredAt } = kDGolomb2007;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [3, 1],
      [1, 1],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -90, measuredAt: null });
  });
});
