import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Hyperpolarisation-activated cation conductance of layer 5 pyramidal cells, I = g·m·(V − E), E = −45 mV.
 *
 *     α_m = 0.00643·(V + 154.9)/(exp((V + 154.9)/11.9) − 1)    β_m = 0.193·exp(V/33.1)
 *
 * V in mV, rates in 1/ms, at 34 °C; no Q10 given: not scaled.
 *
 * @source Kole MHP, Hallermann S, Stuart GJ (2006), J Neurosci 26:1677–1687 (rates from memory; agree with three
 *         transcriptions; the growth of density read in Eyal G et al. (2016), eLife 5:e16553, eq. 4).
 */
export const hKole2006: StoredChannel = storedChannel({
  name: 'h-kole-2006',
  ion: 'Na/K',
  title: 'h, Kole 2006',
  reversal_mV: -45,
  measuredAt_C: 34,
  gates: [
    {
      name: 'm',
      power: 1,
      alpha: { kind: 'linexp', A: -0.00643, V0: -154.9, k: -11.9 },
      beta: { kind: 'exp', A: 0.193, V0: 0, k: 33.1 },
    },
  ],
  source: 'Kole MHP, Hallermann S, Stuart GJ (2006), J Neurosci 26:1677–1687',
  fromMemory: true,
  note: 'Layer 5 pyramidal cells. No Q10 is known for this fit: use it near 34 °C. The density grows exponentially along the apical dendrite.',
});
