import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Transient sodium conductance of regular-spiking cortical cells, I = g·m³·h·(V − E), E = +50 mV; m at its steady state.
 *
 *     m∞ = 1/(1 + exp(−(V + 34.5)/10))
 *     h∞ = 1/(1 + exp((V + 59.4)/10.7))    τ_h = 0.15 + 1.15/(1 + exp((V + 33.5)/15))
 *
 * V in mV, τ in ms. No temperature stated: not scaled.
 *
 * @source Traub RD et al. (2005), J Neurophysiol 93:2194–2232, after Martina M, Jonas P (1997), J Physiol 505:593–603; read
 *         in Aussel A, Fiebelkorn IC, Kastner S, Kopell NJ, Pittman-Polletta BR (2023), eLife 12:e67684, table 1.
 */
export const naTraub2005: StoredChannel = storedChannel({
  name: 'na-traub-2005',
  ion: 'Na',
  title: 'Na, Traub 2005',
  reversal_mV: 50,
  measuredAt_C: null,
  gates: [
    { name: 'm', power: 3, inf: { kind: 'logistic', A: 1, V0: -34.5, k: -10 }, instant: true },
    {
      name: 'h',
      power: 1,
      inf: { kind: 'logistic', A: 1, V0: -59.4, k: 10.7 },
      tau: {
        kind: 'sum',
        of: [
          { kind: 'const', value: 0.15 },
          { kind: 'logistic', A: 1.15, V0: -33.5, k: 15 },
        ],
      },
    },
  ],
  source:
    'Traub RD et al. (2005), J Neurophysiol 93:2194–2232; as printed in Aussel A et al. (2023), eLife 12:e67684, table 1',
  fromMemory: false,
  note: 'Regular-spiking cortical cells. Activation follows the voltage at once. No temperature stated (meant for body temperature), so nothing is scaled.',
});
