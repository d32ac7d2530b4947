import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * A-type potassium conductance, I = g·a³·b·(V − E), E = −75 mV.
 *
 *     a∞ = (0.0761·exp((V + 94.22)/31.84)/(1 + exp((V + 1.17)/28.93)))^(1/3)
 *     τ_a = 0.3632 + 1.158/(1 + exp((V + 55.96)/20.12))
 *     b∞ = (1/(1 + exp((V + 53.3)/14.54)))⁴
 *     τ_b = 1.24 + 2.678/(1 + exp((V + 50)/16.027))
 *
 * V in mV, τ in ms, at 18.5 °C; rates × 3 per 10 °C. a∞ passes 1 between +40 and +98 mV (1.0137 at +65.5 mV): the
 * published fit, kept as it is.
 *
 * @source Connor JA, Stevens CF (1971), J Physiol 213:31–53; Connor JA, Walter D, McKown R (1977), Biophys J 18:81–102;
 *         constants as collected in Dayan P, Abbott LF (2001), Theoretical Neuroscience, ch. 6 (read in a textbook chapter
 *         that restates them). Temperature inferred from the factor 3.8 = 3^((18.5 − 6.3)/10); Q10 from memory.
 */
export const kAConnorStevens1971: StoredChannel = storedChannel({
  name: 'k-a-connor-stevens-1971',
  ion: 'K',
  title: 'K A-type, Connor & Stevens 1971',
  reversal_mV: -75,
  measuredAt_C: 18.5,
  gates: [
    {
      name: 'a',
      power: 3,
      q10: 3,
      inf: {
        kind: 'power',
        of: {
          kind: 'product',
          of: [
            { kind: 'exp', A: 0.0761, V0: -94.22, k: 31.84 },
            { kind: 'logistic', A: 1, V0: -1.17, k: 28.93 },
          ],
        },
        exponent: 1 / 3,
      },
      tau: {
        kind: 'sum',
        of: [
          { kind: 'const', value: 0.3632 },
          { kind: 'logistic', A: 1.158, V0: -55.96, k: 20.12 },
        ],
      },
    },
    {
      name: 'b',
      power: 1,
      q10: 3,
      inf: { kind: 'power', of: { kind: 'logistic', A: 1, V0: -53.3, k: 14.54 }, exponent: 4 },
      tau: {
        kind: 'sum',
        of: [
          { kind: 'const', value: 1.24 },
          { kind: 'logistic', A: 2.678, V0: -50, k: 16.027 },
        ],
      },
    },
  ],
  source:
    'Connor JA, Stevens CF (1971), J Physiol 213:31–53; constants as collected in Dayan P, Abbott LF (2001), Theoretical Neuroscience, ch. 6',
  fromMemory: false,
  note: 'Isolated gastropod neurons (1971) with constants of crustacean axons (1977), as a textbook collects them; preparations from memory. The temperature is inferred from the factor 3.8 on the rates, not printed. The fit of the activation passes 1 between +40 and +98 mV, by at most 1.4 %, and is kept as published.',
});
