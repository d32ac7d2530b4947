import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Kv3-type delayed-rectifier potassium conductance of fast-spiking interneurons, I = g·n²·(V − E), E = −90 mV.
 *
 *     n∞ = 1/(1 + exp(−(V + 12.4)/6.8))
 *     τ_n = (0.087 + 11.4/(1 + exp((V + 14.6)/8.6)))·(0.087 + 11.4/(1 + exp(−(V − 1.3)/18.7)))
 *
 * V in mV, τ in ms. No temperature stated: not scaled. The paper also lists −27 and −15 mV, of another form of τ_n.
 *
 * @source Golomb D, Donner K, Shacham L, Shlosberg D, Amitai Y, Hansel D (2007), PLoS Comput Biol 3:e156 (constants read
 *         there in part; formulas in Aussel A et al. (2023), eLife 12:e67684, table 4).
 */
export const kKv3Golomb2007: StoredChannel = storedChannel({
  name: 'k-kv3-golomb-2007',
  ion: 'K',
  title: 'K Kv3-type, Golomb 2007',
  reversal_mV: -90,
  measuredAt_C: null,
  gates: [
    {
      name: 'n',
      power: 2,
      inf: { kind: 'logistic', A: 1, V0: -12.4, k: -6.8 },
      tau: {
        kind: 'product',
        of: [
          {
            kind: 'sum',
            of: [
              { kind: 'const', value: 0.087 },
              { kind: 'logistic', A: 11.4, V0: -14.6, k: 8.6 },
            ],
          },
          {
            kind: 'sum',
            of: [
              { kind: 'const', value: 0.087 },
              { kind: 'logistic', A: 11.4, V0: 1.3, k: -18.7 },
            ],
          },
        ],
      },
    },
  ],
  source: 'Golomb D, Donner K, Shacham L, Shlosberg D, Amitai Y, Hansel D (2007), PLoS Comput Biol 3:e156',
  fromMemory: false,
  note: 'Fast-spiking cortical interneurons. The time constant is the product printed by Aussel et al. (2023); the paper also lists constants of another form. No temperature stated, so nothing is scaled.',
});
