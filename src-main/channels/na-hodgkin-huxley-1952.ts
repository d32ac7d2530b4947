import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Transient sodium conductance of the squid giant axon, I = g·m³·h·(V − E), E = +50 mV, V absolute with rest at −65 mV.
 *
 *     α_m = 0.1·(V + 40)/(1 − exp(−(V + 40)/10))    β_m = 4·exp(−(V + 65)/18)
 *     α_h = 0.07·exp(−(V + 65)/20)                  β_h = 1/(1 + exp(−(V + 35)/10))
 *
 * At 6.3 °C; rates × 3 per 10 °C. The paper counts V from rest with depolarisation negative.
 *
 * @source Hodgkin AL, Huxley AF (1952), J Physiol 117:500–544, eqs 20, 21, 23, 24, Table 3 (read in later texts that
 *         restate them; numbering and Q10 from memory).
 */
export const naHodgkinHuxley1952: StoredChannel = storedChannel({
  name: 'na-hodgkin-huxley-1952',
  ion: 'Na',
  title: 'Na, Hodgkin & Huxley 1952',
  reversal_mV: 50,
  measuredAt_C: 6.3,
  gates: [
    {
      name: 'm',
      power: 3,
      q10: 3,
      alpha: { kind: 'linexp', A: 0.1, V0: -40, k: 10 },
      beta: { kind: 'exp', A: 4, V0: -65, k: -18 },
    },
    {
      name: 'h',
      power: 1,
      q10: 3,
      alpha: { kind: 'exp', A: 0.07, V0: -65, k: -20 },
      beta: { kind: 'logistic', A: 1, V0: -35, k: -10 },
    },
  ],
  source: 'Hodgkin AL, Huxley AF (1952), J Physiol 117:500–544',
  fromMemory: false,
  note: 'Squid giant axon, rest at −65 mV. Q10 from memory.',
});
