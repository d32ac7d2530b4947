import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Delayed-rectifier potassium conductance of regular-spiking cortical cells, I = g·m⁴·(V − E), E = −95 mV.
 *
 *     m∞ = 1/(1 + exp(−(V + 29.5)/10))    τ_m = 0.25 + 4.35·exp(−|V + 10|/10)
 *
 * V in mV, τ in ms. No temperature stated: not scaled. The corner of τ_m at −10 mV is in the literature.
 *
 * @source Traub RD et al. (2005), J Neurophysiol 93:2194–2232; read in Aussel A, Fiebelkorn IC, Kastner S, Kopell NJ,
 *         Pittman-Polletta BR (2023), eLife 12:e67684, table 1.
 */
export const kTraub2005: StoredChannel = storedChannel({
  name: 'k-traub-2005',
  ion: 'K',
  title: 'K, Traub 2005',
  reversal_mV: -95,
  measuredAt_C: null,
  gates: [
    {
      name: 'm',
      power: 4,
      inf: { kind: 'logistic', A: 1, V0: -29.5, k: -10 },
      tau: (V) => 0.25 + 4.35 * Math.exp(-Math.abs(V + 10) / 10),
    },
  ],
  source:
    'Traub RD et al. (2005), J Neurophysiol 93:2194–2232; as printed in Aussel A et al. (2023), eLife 12:e67684, table 1',
  fromMemory: false,
  note: 'Regular-spiking cortical cells, delayed rectifier. The time constant has a corner at −10 mV, as published. No temperature stated, so nothing is scaled.',
});
