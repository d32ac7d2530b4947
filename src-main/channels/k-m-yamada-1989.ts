import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Slow M-type potassium conductance, I = g·p·(V − E), E = −90 mV.
 *
 *     p∞ = 1/(1 + exp(−(V + 35)/10))    τ_p = 1000/(3.3·exp((V + 35)/20) + exp(−(V + 35)/20))
 *
 * V in mV, τ in ms, at 36 °C; rates × 2.3 per 10 °C.
 *
 * @source Yamada WM, Koch C, Adams PR (1989), in Methods in Neuronal Modeling (Koch & Segev), MIT Press, pp 97–134; as used
 *         in Pospischil M et al. (2008), Biol Cybern 99:427–441 (p∞ and the form of τ_p read in course notes on those
 *         cells, which have 500 ms; 1000 ms and Q10 from memory).
 */
export const kMYamada1989: StoredChannel = storedChannel({
  name: 'k-m-yamada-1989',
  ion: 'K',
  title: 'K M-type, Yamada 1989',
  reversal_mV: -90,
  measuredAt_C: 36,
  gates: [
    {
      name: 'p',
      power: 1,
      q10: 2.3,
      inf: { kind: 'logistic', A: 1, V0: -35, k: -10 },
      tau: {
        kind: 'product',
        of: [
          { kind: 'const', value: 1000 },
          {
            kind: 'reciprocal',
            of: {
              kind: 'sum',
              of: [
                { kind: 'exp', A: 3.3, V0: -35, k: 20 },
                { kind: 'exp', A: 1, V0: -35, k: -20 },
              ],
            },
          },
        ],
      },
    },
  ],
  source:
    'Yamada WM, Koch C, Adams PR (1989), in Methods in Neuronal Modeling (Koch & Segev), MIT Press, pp 97–134; as used in Pospischil M et al. (2008), Biol Cybern 99:427–441',
  fromMemory: false,
  note: 'Slow, not inactivating. Longest time constant 1000 ms, from memory; cortical cells have been fitted with 500 to 4000 ms. Q10 from memory.',
});
