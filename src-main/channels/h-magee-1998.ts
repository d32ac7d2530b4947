import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/** zF/(RT) as fitted, per mV. */
const slope = 0.0378 * 2.2;

/**
 * Hyperpolarisation-activated cation conductance of CA1 pyramidal cells, I = g·l·(V − E), E = −30 mV.
 *
 *     l∞ = 1/(1 + exp((V + 82)/8))    τ_l = exp(0.4·s·(V + 75))/(0.011·(1 + exp(s·(V + 75)))),  s = 0.0378·2.2 per mV
 *
 * V in mV, τ in ms, at 33 °C; rates × 4.5 per 10 °C. Half-activation −82 mV is that of soma and trunk to 100 µm; −90 mV
 * beyond.
 *
 * @source Magee JC (1998), J Neurosci 18:7613–7624; fit as in Poolos NP, Migliore M, Johnston D (2002), Nat Neurosci
 *         5:767–774 (from memory; agrees with transcriptions; the rise of density read in the abstract of 1998).
 */
export const hMagee1998: StoredChannel = storedChannel({
  name: 'h-magee-1998',
  ion: 'Na/K',
  title: 'h, Magee 1998',
  reversal_mV: -30,
  measuredAt_C: 33,
  gates: [
    {
      name: 'l',
      power: 1,
      q10: 4.5,
      inf: { kind: 'logistic', A: 1, V0: -82, k: 8 },
      tau: {
        kind: 'product',
        of: [
          { kind: 'exp', A: 1 / 0.011, V0: -75, k: 1 / (0.4 * slope) },
          { kind: 'logistic', A: 1, V0: -75, k: 1 / slope },
        ],
      },
    },
  ],
  source:
    'Magee JC (1998), J Neurosci 18:7613–7624; fit as in Poolos NP, Migliore M, Johnston D (2002), Nat Neurosci 5:767–774',
  fromMemory: true,
  note: 'CA1 pyramidal cells, soma and trunk to 100 µm; beyond, half-activation is 8 mV more negative. The density rises more than sixfold from soma to distal apical dendrite.',
});
