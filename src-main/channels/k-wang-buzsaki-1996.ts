import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Delayed-rectifier potassium conductance of a fast-spiking interneuron, I = g·n⁴·(V − E), E = −90 mV.
 *
 *     α_n = 0.05·(V + 34)/(1 − exp(−(V + 34)/10))    β_n = 0.625·exp(−(V + 44)/80)
 *
 * V in mV, rates in 1/ms. No temperature stated: not scaled. The paper's factor φ = 5 is contained.
 *
 * @source Wang X-J, Buzsáki G (1996), J Neurosci 16:6402–6413 (from memory; agrees with quotations of its model section).
 */
export const kWangBuzsaki1996: StoredChannel = storedChannel({
  name: 'k-wang-buzsaki-1996',
  ion: 'K',
  title: 'K, Wang & Buzsáki 1996',
  reversal_mV: -90,
  measuredAt_C: null,
  gates: [
    {
      name: 'n',
      power: 4,
      alpha: { kind: 'linexp', A: 0.05, V0: -34, k: 10 },
      beta: { kind: 'exp', A: 0.625, V0: -44, k: -80 },
    },
  ],
  source: 'Wang X-J, Buzsáki G (1996), J Neurosci 16:6402–6413',
  fromMemory: true,
  note: 'Fast-spiking interneuron, delayed rectifier. The paper states no temperature and its factor 5 on the rates is contained, so nothing is scaled.',
});
