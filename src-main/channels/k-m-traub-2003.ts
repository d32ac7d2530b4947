import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Slow M-type potassium conductance of cortical cells, I = g·m·(V − E), E = −95 mV.
 *
 *     α_m = 0.02/(1 + exp(−(V + 20)/5))    β_m = 0.01·exp(−(V + 43)/18)
 *
 * V in mV, rates in 1/ms. No temperature stated: not scaled.
 *
 * @source Traub RD et al. (2003), J Neurophysiol 89:909–921; read in Aussel A, Fiebelkorn IC, Kastner S, Kopell NJ,
 *         Pittman-Polletta BR (2023), eLife 12:e67684, table 5.
 */
export const kMTraub2003: StoredChannel = storedChannel({
  name: 'k-m-traub-2003',
  ion: 'K',
  title: 'K M-type, Traub 2003',
  reversal_mV: -95,
  measuredAt_C: null,
  gates: [
    {
      name: 'm',
      power: 1,
      alpha: { kind: 'logistic', A: 0.02, V0: -20, k: -5 },
      beta: { kind: 'exp', A: 0.01, V0: -43, k: -18 },
    },
  ],
  source:
    'Traub RD et al. (2003), J Neurophysiol 89:909–921; as printed in Aussel A et al. (2023), eLife 12:e67684, table 5',
  fromMemory: false,
  note: 'Cortical cells, slow, not inactivating. No temperature stated, so nothing is scaled.',
});
