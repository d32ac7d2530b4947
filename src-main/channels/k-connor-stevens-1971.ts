import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Delayed-rectifier potassium conductance of the Connor–Stevens membrane, I = g·n⁴·(V − E), E = −72 mV.
 *
 *     α_n = 0.02·(V + 45.7)/(1 − exp(−(V + 45.7)/10))    β_n = 0.25·exp(−(V + 55.7)/80)
 *
 * V in mV, rates in 1/ms, at 18.5 °C; rates × 3 per 10 °C.
 *
 * @source Connor JA, Stevens CF (1971), J Physiol 213:31–53; Connor JA, Walter D, McKown R (1977), Biophys J 18:81–102;
 *         constants as collected in Dayan P, Abbott LF (2001), Theoretical Neuroscience, ch. 6 (read in a textbook chapter
 *         that restates them). Temperature inferred from the factor 3.8 = 3^((18.5 − 6.3)/10); Q10 from memory.
 */
export const kConnorStevens1971: StoredChannel = storedChannel({
  name: 'k-connor-stevens-1971',
  ion: 'K',
  title: 'K, Connor & Stevens 1971',
  reversal_mV: -72,
  measuredAt_C: 18.5,
  gates: [
    {
      name: 'n',
      power: 4,
      q10: 3,
      alpha: { kind: 'linexp', A: 0.02, V0: -45.7, k: 10 },
      beta: { kind: 'exp', A: 0.25, V0: -55.7, k: -80 },
    },
  ],
  source:
    'Connor JA, Stevens CF (1971), J Physiol 213:31–53; constants as collected in Dayan P, Abbott LF (2001), Theoretical Neuroscience, ch. 6',
  fromMemory: false,
  note: 'Isolated gastropod neurons (1971) with constants of crustacean axons (1977), as a textbook collects them; preparations from memory. The temperature is inferred from the factor 3.8 on the rates, not printed.',
});
