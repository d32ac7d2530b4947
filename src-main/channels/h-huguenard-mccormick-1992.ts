import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Hyperpolarisation-activated cation conductance of thalamic relay cells, I = g·m·(V − E), E = −43 mV.
 *
 *     m∞ = 1/(1 + exp((V + 75)/5.5))    τ_m = 1/(exp(−14.59 − 0.086·V) + exp(−1.87 + 0.0701·V))
 *
 * V in mV, τ in ms, at 35 °C; rates × 3 per 10 °C.
 *
 * @source Huguenard JR, McCormick DA (1992), J Neurophysiol 68:1373–1383; data of McCormick DA, Pape H-C (1990), J Physiol
 *         431:291–318 (constants read in Aussel A et al. (2023), eLife 12:e67684, tables 1, 3, 5; 14.59 and 0.0701 printed
 *         there as 14.6 and 0.07; E, temperature and Q10 from memory).
 */
export const hHuguenardMccormick1992: StoredChannel = storedChannel({
  name: 'h-huguenard-mccormick-1992',
  ion: 'Na/K',
  title: 'h, Huguenard & McCormick 1992',
  reversal_mV: -43,
  measuredAt_C: 35,
  gates: [
    {
      name: 'm',
      power: 1,
      q10: 3,
      inf: { kind: 'logistic', A: 1, V0: -75, k: 5.5 },
      tau: {
        kind: 'reciprocal',
        of: {
          kind: 'sum',
          of: [
            { kind: 'exp', A: Math.exp(-14.59), V0: 0, k: -1 / 0.086 },
            { kind: 'exp', A: Math.exp(-1.87), V0: 0, k: 1 / 0.0701 },
          ],
        },
      },
    },
  ],
  source:
    'Huguenard JR, McCormick DA (1992), J Neurophysiol 68:1373–1383; data of McCormick DA, Pape H-C (1990), J Physiol 431:291–318',
  fromMemory: false,
  note: 'Thalamic relay cells. Reversal potential, temperature (34 to 36 °C) and Q10 (3 to 4.5 in the literature) from memory.',
});
