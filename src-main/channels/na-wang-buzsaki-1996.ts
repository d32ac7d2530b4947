import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Transient sodium conductance of a fast-spiking interneuron, I = g·m³·h·(V − E), E = +55 mV; m at its steady state.
 *
 *     α_m = 0.1·(V + 35)/(1 − exp(−(V + 35)/10))    β_m = 4·exp(−(V + 60)/18)
 *     α_h = 0.35·exp(−(V + 58)/20)                  β_h = 5/(1 + exp(−(V + 28)/10))
 *
 * V in mV, rates in 1/ms. No temperature stated: not scaled. The paper's factor φ = 5 is contained in h.
 *
 * @source Wang X-J, Buzsáki G (1996), J Neurosci 16:6402–6413 (from memory; agrees with quotations of its model section).
 */
export const naWangBuzsaki1996: StoredChannel = storedChannel({
  name: 'na-wang-buzsaki-1996',
  ion: 'Na',
  title: 'Na, Wang & Buzsáki 1996',
  reversal_mV: 55,
  measuredAt_C: null,
  gates: [
    {
      name: 'm',
      power: 3,
      alpha: { kind: 'linexp', A: 0.1, V0: -35, k: 10 },
      beta: { kind: 'exp', A: 4, V0: -60, k: -18 },
      instant: true,
    },
    {
      name: 'h',
      power: 1,
      alpha: { kind: 'exp', A: 0.35, V0: -58, k: -20 },
      beta: { kind: 'logistic', A: 5, V0: -28, k: -10 },
    },
  ],
  source: 'Wang X-J, Buzsáki G (1996), J Neurosci 16:6402–6413',
  fromMemory: true,
  note: 'Fast-spiking interneuron. Activation follows the voltage at once. The paper states no temperature and its factor 5 on the rates is contained, so nothing is scaled.',
});
