import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Persistent sodium conductance of respiratory neurons, I = g·m·h·(V − E), E = +50 mV; m at its steady state.
 *
 *     m∞ = 1/(1 + exp(−(V + 40)/6))    h∞ = 1/(1 + exp((V + 55)/12))    τ_h = 4000/cosh((V + 55)/24)
 *
 * V in mV, τ in ms. No temperature stated: not scaled. Published as 5 nS per 20 pF: 0.25 mS/cm² at 1 µF/cm².
 *
 * @source Ausborn J et al. (2018), J Neurophysiol 119:96–117, table 1 (read); form of Butera RJ, Rinzel J, Smith JC (1999),
 *         J Neurophysiol 82:382–397.
 */
export const naPersistentAusborn2018: StoredChannel = storedChannel({
  name: 'na-persistent-ausborn-2018',
  ion: 'Na',
  title: 'Na persistent, Ausborn 2018',
  reversal_mV: 50,
  measuredAt_C: null,
  gates: [
    { name: 'm', power: 1, inf: { kind: 'logistic', A: 1, V0: -40, k: -6 }, instant: true },
    {
      name: 'h',
      power: 1,
      inf: { kind: 'logistic', A: 1, V0: -55, k: 12 },
      tau: (V) => 4000 / Math.cosh((V + 55) / 24),
    },
  ],
  source:
    'Ausborn J et al. (2018), J Neurophysiol 119:96–117, table 1; form of Butera RJ, Rinzel J, Smith JC (1999), J Neurophysiol 82:382–397',
  fromMemory: false,
  note: 'Respiratory neurons, inactivating over seconds. Activation follows the voltage at once. Published as 5 nS per 20 pF cell. No temperature stated, so nothing is scaled.',
});
