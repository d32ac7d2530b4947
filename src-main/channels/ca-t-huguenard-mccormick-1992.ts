import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/** mV. */
const Vs = 2;

/**
 * Low-threshold T-type calcium conductance of thalamic relay cells, I = g·m²·h·(V − E), E = +120 mV, Vs = +2 mV.
 *
 *     m∞ = 1/(1 + exp(−(V + Vs + 57)/6.2))    τ_m = 0.612 + 1/(exp(−(V + Vs + 132)/16.7) + exp((V + Vs + 16.8)/18.2))
 *     h∞ = 1/(1 + exp((V + Vs + 81)/4))
 *     τ_h = exp((V + Vs + 467)/66.6) below V + Vs = −80 mV, else 28 + exp(−(V + Vs + 22)/10.5)
 *
 * V in mV, τ in ms, at 24 °C; rates of m × 5, of h × 3 per 10 °C. τ_h jumps from 334 to 279 ms at −80 mV: both branches as
 * published. Published as a permeability; the ohmic form is common practice. Vs is the surface-charge shift with 2 mM
 * calcium outside.
 *
 * @source Huguenard JR, McCormick DA (1992), J Neurophysiol 68:1373–1383; Destexhe A, Neubig M, Ulrich D, Huguenard J
 *         (1998), J Neurosci 18:3574–3588 (from memory; agrees with transcriptions).
 */
export const caTHuguenardMccormick1992: StoredChannel = storedChannel({
  name: 'ca-t-huguenard-mccormick-1992',
  ion: 'Ca',
  title: 'Ca T-type, Huguenard & McCormick 1992',
  reversal_mV: 120,
  measuredAt_C: 24,
  gates: [
    {
      name: 'm',
      power: 2,
      q10: 5,
      inf: { kind: 'logistic', A: 1, V0: -59, k: -6.2 },
      tau: {
        kind: 'sum',
        of: [
          { kind: 'const', value: 0.612 },
          {
            kind: 'reciprocal',
            of: {
              kind: 'sum',
              of: [
                { kind: 'exp', A: 1, V0: -134, k: -16.7 },
                { kind: 'exp', A: 1, V0: -18.8, k: 18.2 },
              ],
            },
          },
        ],
      },
    },
    {
      name: 'h',
      power: 1,
      q10: 3,
      inf: { kind: 'logistic', A: 1, V0: -83, k: 4 },
      tau: (V) => (V + Vs < -80 ? Math.exp((V + Vs + 467) / 66.6) : 28 + Math.exp(-(V + Vs + 22) / 10.5)),
    },
  ],
  source:
    'Huguenard JR, McCormick DA (1992), J Neurophysiol 68:1373–1383; Destexhe A, Neubig M, Ulrich D, Huguenard J (1998), J Neurosci 18:3574–3588',
  fromMemory: true,
  note: 'Thalamic relay cells. Published as a permeability; the ohmic form with a fixed reversal potential used here is common practice. Surface-charge shift +2 mV; −1 to +3.5 mV are in print. The time constant of inactivation jumps from 334 to 279 ms at −82 mV, as published.',
});
