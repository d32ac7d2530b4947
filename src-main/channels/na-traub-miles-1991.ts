import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/** mV. */
const VT = -56.2;

/**
 * Transient sodium conductance of cortical cells, I = g·m³·h·(V − E), E = +50 mV, threshold shift VT = −56.2 mV.
 *
 *     α_m = 0.32·(V − VT − 13)/(1 − exp(−(V − VT − 13)/4))    β_m = 0.28·(V − VT − 40)/(exp((V − VT − 40)/5) − 1)
 *     α_h = 0.128·exp(−(V − VT − 17)/18)                      β_h = 4/(1 + exp(−(V − VT − 40)/5))
 *
 * V in mV, rates in 1/ms, at 36 °C; rates × 3 per 10 °C.
 *
 * @source Traub RD, Miles R (1991), Neuronal Networks of the Hippocampus, Cambridge Univ Press; form with VT in Pospischil
 *         M et al. (2008), Biol Cybern 99:427–441 (read in later texts that restate it; Q10 about 36 °C from memory).
 */
export const naTraubMiles1991: StoredChannel = storedChannel({
  name: 'na-traub-miles-1991',
  ion: 'Na',
  title: 'Na, Traub & Miles 1991',
  reversal_mV: 50,
  measuredAt_C: 36,
  gates: [
    {
      name: 'm',
      power: 3,
      q10: 3,
      alpha: { kind: 'linexp', A: 0.32, V0: VT + 13, k: 4 },
      beta: { kind: 'linexp', A: -0.28, V0: VT + 40, k: -5 },
    },
    {
      name: 'h',
      power: 1,
      q10: 3,
      alpha: { kind: 'exp', A: 0.128, V0: VT + 17, k: -18 },
      beta: { kind: 'logistic', A: 4, V0: VT + 40, k: -5 },
    },
  ],
  source:
    'Traub RD, Miles R (1991), Neuronal Networks of the Hippocampus, Cambridge Univ Press; with a threshold shift as in Pospischil M et al. (2008), Biol Cybern 99:427–441',
  fromMemory: false,
  note: 'Cortical cells, with the threshold shift VT = −56.2 mV of a regular-spiking cell; the literature has −50 to −65 mV. Q10 from memory.',
});
