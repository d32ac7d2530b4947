import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Persistent sodium conductance of entorhinal cells, I = g·m³·h·(V − E), E = +50 mV.
 *
 *     m∞ = 1/(1 + exp(−(V + 52.6)/4.6))    h∞ = 1/(1 + exp((V + 48.8)/10))
 *     τ_m = 6/(0.182·(V + 38)/(1 − exp(−(V + 38)/6)) − 0.124·(V + 38)/(1 − exp((V + 38)/6)))
 *     τ_h = 1/(2.88e-6·(V + 17)/(exp((V + 17)/4.63) − 1) + 6.94e-6·(V + 64.4)/(1 − exp(−(V + 64.4)/2.63)))
 *
 * V in mV, τ in ms, at 21 °C; rates × 2.3 per 10 °C. The narrow activation to the third power is a choice of Hay et al.
 *
 * @source Magistretti J, Alonso A (1999), J Gen Physiol 114:491–509; form in Hay E, Hill S, Schürmann F, Markram H, Segev I
 *         (2011), PLoS Comput Biol 7:e1002107 (from memory; agrees with transcriptions and with half-inactivation and time
 *         constants in the abstract of 1999).
 */
export const naPersistentMagistrettiAlonso1999: StoredChannel = storedChannel({
  name: 'na-persistent-magistretti-alonso-1999',
  ion: 'Na',
  title: 'Na persistent, Magistretti & Alonso 1999',
  reversal_mV: 50,
  measuredAt_C: 21,
  gates: [
    {
      name: 'm',
      power: 3,
      q10: 2.3,
      inf: { kind: 'logistic', A: 1, V0: -52.6, k: -4.6 },
      tau: {
        kind: 'product',
        of: [
          { kind: 'const', value: 6 },
          {
            kind: 'reciprocal',
            of: {
              kind: 'sum',
              of: [
                { kind: 'linexp', A: 0.182, V0: -38, k: 6 },
                { kind: 'linexp', A: -0.124, V0: -38, k: -6 },
              ],
            },
          },
        ],
      },
    },
    {
      name: 'h',
      power: 1,
      q10: 2.3,
      inf: { kind: 'logistic', A: 1, V0: -48.8, k: 10 },
      tau: {
        kind: 'reciprocal',
        of: {
          kind: 'sum',
          of: [
            { kind: 'linexp', A: -2.88e-6, V0: -17, k: -4.63 },
            { kind: 'linexp', A: 6.94e-6, V0: -64.4, k: 2.63 },
          ],
        },
      },
    },
  ],
  source:
    'Magistretti J, Alonso A (1999), J Gen Physiol 114:491–509; form as in Hay E, Hill S, Schürmann F, Markram H, Segev I (2011), PLoS Comput Biol 7:e1002107',
  fromMemory: true,
  note: 'Entorhinal cortex, inactivating over seconds. The activation with its power 3 is a choice of Hay et al. (2011), not the measured curve. Q10 from memory.',
});
