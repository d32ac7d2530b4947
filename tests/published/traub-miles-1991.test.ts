// Traub RD, Miles R (1991), Neuronal Networks of the Hippocampus, Cambridge Univ Press; form with the threshold shift VT in
// Pospischil M et al. (2008), Biol Cybern 99:427–441. Rates read in later texts that restate them; the cell from memory.
// Values marked "computed" were worked out from the formulas as written there by another program, six digits each.
import { describe, expect, it } from 'vitest';
import { naTraubMiles1991 } from '../../src-main/channels/na-traub-miles-1991.ts';
import { kTraubMiles1991 } from '../../src-main/channels/k-traub-miles-1991.ts';
import { kMYamada1989 } from '../../src-main/channels/k-m-yamada-1989.ts';
import { restOf, spikesUnder } from '../support/firing.ts';
import { closing, gateValues, opening, worstOf } from '../support/gate-values.ts';

/** Half a unit in the sixth digit. */
const rounding = 6e-6;

describe('na-traub-miles-1991, computed', () => {
  // V (mV): m_inf, m_tau, h_inf, h_tau; τ in ms.
  it.each([
    [-100, 5.27369e-7, 0.0426185, 1.0, 0.266587],
    [-80, 6.66076e-5, 0.0559746, 0.999991, 0.809814],
    [-65, 0.00219793, 0.0730199, 0.99957, 1.86258],
    [-50, 0.0488258, 0.100388, 0.980528, 4.20411],
    [-43.2, 0.144237, 0.112685, 0.898868, 5.6231],
    [-40, 0.216702, 0.116535, 0.797534, 5.95988],
    [-20, 0.788387, 0.105873, 0.033407, 0.758359],
    [-16.2, 0.860698, 0.0995012, 0.0175215, 0.491239],
    [0, 0.986802, 0.0713818, 0.00375322, 0.258816],
    [20, 0.99964, 0.0494284, 0.00119288, 0.249881],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(naTraubMiles1991, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 3, 1, Q10 3, 3 and reverses at 50 mV', () => {
    const { gates, reversal, measuredAt } = naTraubMiles1991;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([
      [3, 3],
      [1, 3],
    ]);
    expect({ reversal, measuredAt }).toEqual({ reversal: 50, measuredAt: 36 });
  });
});

describe('k-traub-miles-1991, computed', () => {
  // V (mV): n_inf, n_tau; τ in ms.
  it.each([
    [-100, 7.65823e-6, 0.521075],
    [-80, 0.000454878, 0.858724],
    [-65, 0.00815784, 1.23981],
    [-50, 0.0961874, 1.64381],
    [-41.2, 0.266113, 1.66321],
    [-40, 0.295914, 1.64426],
    [-20, 0.726044, 1.05481],
    [0, 0.893293, 0.67738],
    [20, 0.953482, 0.486865],
  ])('at %s mV', (V, ...expected) => {
    expect(worstOf(gateValues(kTraubMiles1991, V), expected)).toBeLessThan(rounding);
  });

  it('has powers 4, Q10 3 and reverses at -90 mV', () => {
    const { gates, reversal, measuredAt } = kTraubMiles1991;
    expect(gates.map(({ power, q10 }) => [power, q10])).toEqual([[4, 3]]);
    expect({ reversal, measuredAt }).toEqual({ reversal: -90, measuredAt: 36 });
  });
});

const m = naTraubMiles1991.gates[0]!;
const n = kTraubMiles1991.gates[0]!;
describe('singular points', () => {
  it('have the limits 1.28, 1.4 and 0.16 per ms', () => {
    expect(opening(m, -43.2)).toBeCloseTo(1.28, 12);
    expect(closing(m, -16.2)).toBeCloseTo(1.4, 12);
    expect(opening(n, -41.2)).toBeCloseTo(0.16, 12);
  });

  it.each([1e-3, 1e-5, 1e-7, 1e-9])('have no step %s mV beside them', (away) => {
    // The value on both sides is the limit to first order: their mean is off by the curvature alone.
    expect((opening(m, -43.2 + away) + opening(m, -43.2 - away)) / 2 / 1.28 - 1).toBeCloseTo(0, 7);
    expect((closing(m, -16.2 + away) + closing(m, -16.2 - away)) / 2 / 1.4 - 1).toBeCloseTo(0, 7);
    expect((opening(n, -41.2 + away) + opening(n, -41.2 - away)) / 2 / 0.16 - 1).toBeCloseTo(0, 7);
  });
});

describe('a regular-spiking cell of Pospischil et al. (2008), 36 °C (computed, variable steps at 1e-8)', () => {
  const slow = kMYamada1989;
  // τ_max is 608 ms in that cell, 1000 ms in the stored channel.
  const faster = { ...slow, name: 'M', gates: slow.gates.map((p) => ({ ...p, tau: (V: number) => 0.608 * p.tau(V) })) };
  const membrane = {
    channels: { [naTraubMiles1991.name]: 56, [kTraubMiles1991.name]: 6, M: 0.075 },
    reversals: { [naTraubMiles1991.name]: 50, [kTraubMiles1991.name]: -90, M: -90 },
    leak: { conductance: 0.0205, reversal: -70.3 },
    temperature: 36,
    others: [faster],
  };

  it('rests at −71.911 mV', () => {
    expect(restOf(membrane)).toBeCloseTo(-71.911, 3);
  });

  it.each([
    [1, 12, 45.53, 93.63],
    [2, 34, 16.69, 30.57],
    [4, 84, 8.63, 12.16],
  ])('adapts: under %s µA/cm² for 1 s, %s spikes, first interval %s ms, last %s ms', (density, count, first, last) => {
    const spikes = spikesUnder(membrane, density, 1000);
    expect(spikes).toHaveLength(count);
    expect((spikes[1]! - spikes[0]!) / first - 1).toBeCloseTo(0, 3);
    expect((spikes.at(-1)! - spikes.at(-2)!) / last - 1).toBeCloseTo(0, 3);
  });
});
