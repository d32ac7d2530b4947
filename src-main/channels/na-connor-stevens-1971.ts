import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Transient sodium conductance of the Connor–Stevens membrane, I = g·m³·h·(V − E), E = +55 mV.
 *
 *     α_m = 0.38·(V + 29.7)/(1 − exp(−(V + 29.7)/10))    β_m = 15.2·exp(−(V + 54.7)/18)
 *     α_h = 0.266·exp(−(V + 48)/20)                      β_h = 3.8/(1 + exp(−(V + 18)/10))
 *
 * V in mV, rates in 1/ms, at 18.5 °C; rates × 3 per 10 °C.
 *
 * @source Connor JA, Stevens CF (1971), J Physiol 213:31–53; Connor JA, Walter D, McKown R (1977), Biophys J 18:81–102;
 *         constants as collected in Dayan P, Abbott LF (2001), Theoretical Neuroscience, ch. 6 (read in a textbook chapter
 *         that restates them). Temperature inferred from the factor 3.8 = 3^((18.5 − 6.3)/10); Q10 from memory.
 */
export const naConnorStevens1971: StoredChannel = storedChannel({
  name: 'na-connor-stevens-1971',
  ion: 'Na',
  title: 'Na, Connor & Stevens 1971',
  reversal_mV: 55,
  measuredAt_C: 18.5,
  gates: [
    {
      name: 'm',
      power: 3,
      q10: 3,
      alpha: { kind: 'linexp', A: 0.38, V0: -29.7, k: 10 },
      beta: { kind: 'exp', A: 15.2, V0: -54.7, k: -18 },
    },
    {
      name: 'h',
      power: 1,
      q10: 3,
      alpha: { kind: 'exp', A: 0.266, V0: -48, k: -20 },
      beta: { kind: 'logistic', A: 3.8, V0: -18, k: -10 },
    },
  ],
  source:
    'Connor JA, Stevens CF (1971), J Physiol 213:31–53; constants as collected in Dayan P, Abbott LF (2001), Theoretical Neuroscience, ch. 6',
  fromMemory: false,
  note: 'Isolated gastropod neurons (1971) with constants of crustacean axons (1977), as a textbook collects them; preparations from memory. The temperature is inferred from the factor 3.8 on the rates, not printed.',
});
