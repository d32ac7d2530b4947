import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * High-threshold calcium conductance of cortical cells, I = g·m²·(V − E), E = +125 mV.
 *
 *     α_m = 1.6/(1 + exp(−0.072·(V − 5)))    β_m = 0.02·(V + 8.9)/(exp((V + 8.9)/5) − 1)
 *
 * V in mV, rates in 1/ms. No temperature stated: not scaled. No inactivation. Aussel A et al. (2023), eLife 12:e67684,
 * table 5, print α_m with the sign of V reversed: it would fall with depolarisation.
 *
 * @source Traub RD et al. (2003), J Neurophysiol 89:909–921 (β_m read in Aussel et al.; α_m from memory, agrees with one
 *         transcription).
 */
export const caHighTraub2003: StoredChannel = storedChannel({
  name: 'ca-high-traub-2003',
  ion: 'Ca',
  title: 'Ca high-threshold, Traub 2003',
  reversal_mV: 125,
  measuredAt_C: null,
  gates: [
    {
      name: 'm',
      power: 2,
      alpha: { kind: 'logistic', A: 1.6, V0: 5, k: -1 / 0.072 },
      beta: { kind: 'linexp', A: -0.02, V0: -8.9, k: -5 },
    },
  ],
  source: 'Traub RD et al. (2003), J Neurophysiol 89:909–921',
  fromMemory: true,
  note: 'Cortical cells, not inactivating. The opening rate printed in Aussel et al. (2023) has the sign of V reversed; the form here rises with depolarisation. No temperature stated, so nothing is scaled. Ohmic with a fixed reversal potential.',
});
