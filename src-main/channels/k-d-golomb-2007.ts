import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Slowly inactivating D-type potassium conductance of fast-spiking interneurons, I = g·a³·b·(V − E), E = −90 mV.
 *
 *     a∞ = 1/(1 + exp(−(V + 50)/20)), τ_a = 2 ms    b∞ = 1/(1 + exp((V + 70)/6)), τ_b = 150 ms
 *
 * V in mV. No temperature stated: not scaled.
 *
 * @source Golomb D, Donner K, Shacham L, Shlosberg D, Amitai Y, Hansel D (2007), PLoS Comput Biol 3:e156 (constants read
 *         there in part; formulas in Aussel A et al. (2023), eLife 12:e67684, table 4).
 */
export const kDGolomb2007: StoredChannel = storedChannel({
  name: 'k-d-golomb-2007',
  ion: 'K',
  title: 'K D-type, Golomb 2007',
  reversal_mV: -90,
  measuredAt_C: null,
  gates: [
    { name: 'a', power: 3, inf: { kind: 'logistic', A: 1, V0: -50, k: -20 }, tau: { kind: 'const', value: 2 } },
    { name: 'b', power: 1, inf: { kind: 'logistic', A: 1, V0: -70, k: 6 }, tau: { kind: 'const', value: 150 } },
  ],
  source: 'Golomb D, Donner K, Shacham L, Shlosberg D, Amitai Y, Hansel D (2007), PLoS Comput Biol 3:e156',
  fromMemory: false,
  note: 'Fast-spiking cortical interneurons, slowly inactivating. No temperature stated, so nothing is scaled.',
});
