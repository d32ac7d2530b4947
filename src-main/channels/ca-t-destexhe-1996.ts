import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/** mV. */
const Vx = 2;

/**
 * Low-threshold T-type calcium conductance, I = g·s²·u·(V − E), E = +120 mV; s at its steady state, Vx = +2 mV.
 *
 *     s∞ = 1/(1 + exp(−(V + Vx + 57)/6.2))    u∞ = 1/(1 + exp((V + Vx + 81)/4))
 *     τ_u = (30.8 + (211.4 + exp((V + Vx + 113.2)/5))/(1 + exp((V + Vx + 84)/3.2)))/3.737
 *
 * V in mV, τ in ms, at 36 °C (3.737 = 3^1.2 brings data of 24 °C there); rates × 3 per 10 °C. Vx is the surface-charge
 * shift with 2 mM calcium outside. Pospischil M et al. (2008), Biol Cybern 99:427–441, are reported to print τ_u with 30.8
 * inside the fraction.
 *
 * @source Destexhe A et al. (1996), J Neurophysiol 76:2049–2070; data of Huguenard JR, McCormick DA (1992), J Neurophysiol
 *         68:1373–1383, and Huguenard JR, Prince DA (1992), J Neurosci 12:3804–3817 (from memory; agrees with three
 *         transcriptions).
 */
export const caTDestexhe1996: StoredChannel = storedChannel({
  name: 'ca-t-destexhe-1996',
  ion: 'Ca',
  title: 'Ca T-type, Destexhe 1996',
  reversal_mV: 120,
  measuredAt_C: 36,
  gates: [
    { name: 's', power: 2, inf: { kind: 'logistic', A: 1, V0: -59, k: -6.2 }, instant: true },
    {
      name: 'u',
      power: 1,
      q10: 3,
      inf: { kind: 'logistic', A: 1, V0: -83, k: 4 },
      tau: (V) => (30.8 + (211.4 + Math.exp((V + Vx + 113.2) / 5)) / (1 + Math.exp((V + Vx + 84) / 3.2))) / 3.737,
    },
  ],
  source:
    'Destexhe A et al. (1996), J Neurophysiol 76:2049–2070; data of Huguenard JR, McCormick DA (1992) and Huguenard JR, Prince DA (1992), J Neurosci 12:3804–3817',
  fromMemory: true,
  note: 'Thalamic and cortical low-threshold cells; activation follows the voltage at once. Surface-charge shift +2 mV; cortical cells have been fitted with −7 mV. Pospischil et al. (2008) are reported to misprint the time constant. Ohmic with a fixed reversal potential.',
});
