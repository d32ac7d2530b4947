import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/** mV. */
const VT = -56.2;

/**
 * Delayed-rectifier potassium conductance of cortical cells, I = g·n⁴·(V − E), E = −90 mV, threshold shift VT = −56.2 mV.
 *
 *     α_n = 0.032·(V − VT − 15)/(1 − exp(−(V − VT − 15)/5))    β_n = 0.5·exp(−(V − VT − 10)/40)
 *
 * V in mV, rates in 1/ms, at 36 °C; rates × 3 per 10 °C.
 *
 * @source Traub RD, Miles R (1991), Neuronal Networks of the Hippocampus, Cambridge Univ Press; form with VT in Pospischil
 *         M et al. (2008), Biol Cybern 99:427–441 (read in later texts that restate it; Q10 about 36 °C from memory).
 */
export const kTraubMiles1991: StoredChannel = storedChannel({
  name: 'k-traub-miles-1991',
  ion: 'K',
  title: 'K, Traub & Miles 1991',
  reversal_mV: -90,
  measuredAt_C: 36,
  gates: [
    {
      name: 'n',
      power: 4,
      q10: 3,
      alpha: { kind: 'linexp', A: 0.032, V0: VT + 15, k: 5 },
      beta: { kind: 'exp', A: 0.5, V0: VT + 10, k: -40 },
    },
  ],
  source:
    'Traub RD, Miles R (1991), Neuronal Networks of the Hippocampus, Cambridge Univ Press; with a threshold shift as in Pospischil M et al. (2008), Biol Cybern 99:427–441',
  fromMemory: false,
  note: 'Cortical cells, delayed rectifier, with the threshold shift VT = −56.2 mV of a regular-spiking cell; the literature has −50 to −65 mV. Q10 from memory.',
});
