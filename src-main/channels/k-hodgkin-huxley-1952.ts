import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Delayed-rectifier potassium conductance of the squid giant axon, I = g·n⁴·(V − E), E = −77 mV, V absolute with rest
 * at −65 mV.
 *
 *     α_n = 0.01·(V + 55)/(1 − exp(−(V + 55)/10))    β_n = 0.125·exp(−(V + 65)/80)
 *
 * At 6.3 °C; rates × 3 per 10 °C. The paper counts V from rest with depolarisation negative.
 *
 * @source Hodgkin AL, Huxley AF (1952), J Physiol 117:500–544, eqs 12, 13, Table 3 (read in later texts that restate
 *         them; numbering and Q10 from memory).
 */
export const kHodgkinHuxley1952: StoredChannel = storedChannel({
  name: 'k-hodgkin-huxley-1952',
  ion: 'K',
  title: 'K, Hodgkin & Huxley 1952',
  reversal_mV: -77,
  measuredAt_C: 6.3,
  gates: [
    {
      name: 'n',
      power: 4,
      q10: 3,
      alpha: { kind: 'linexp', A: 0.01, V0: -55, k: 10 },
      beta: { kind: 'exp', A: 0.125, V0: -65, k: -80 },
    },
  ],
  source: 'Hodgkin AL, Huxley AF (1952), J Physiol 117:500–544',
  fromMemory: false,
  note: 'Squid giant axon, delayed rectifier, rest at −65 mV. Q10 from memory.',
});
