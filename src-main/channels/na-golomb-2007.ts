import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/**
 * Transient sodium conductance of fast-spiking interneurons, I = g·m³·h·(V − E), E = +50 mV; m at its steady state.
 *
 *     m∞ = 1/(1 + exp(−(V + 24)/11.5))
 *     h∞ = 1/(1 + exp((V + 58.3)/6.7))    τ_h = 0.5 + 14/(1 + exp((V + 60)/12))
 *
 * V in mV, τ in ms. No temperature stated: not scaled.
 *
 * @source Golomb D, Donner K, Shacham L, Shlosberg D, Amitai Y, Hansel D (2007), PLoS Comput Biol 3:e156 (constants read
 *         there in part; formulas in Aussel A et al. (2023), eLife 12:e67684, table 4).
 */
export const naGolomb2007: StoredChannel = storedChannel({
  name: 'na-golomb-2007',
  ion: 'Na',
  title: 'Na, Golomb 2007',
  reversal_mV: 50,
  measuredAt_C: null,
  gates: [
    { name: 'm', power: 3, inf: { kind: 'logistic', A: 1, V0: -24, k: -11.5 }, instant: true },
    {
      name: 'h',
      power: 1,
      inf: { kind: 'logistic', A: 1, V0: -58.3, k: 6.7 },
      tau: {
        kind: 'sum',
        of: [
          { kind: 'const', value: 0.5 },
          { kind: 'logistic', A: 14, V0: -60, k: 12 },
        ],
      },
    },
  ],
  source: 'Golomb D, Donner K, Shacham L, Shlosberg D, Amitai Y, Hansel D (2007), PLoS Comput Biol 3:e156',
  fromMemory: false,
  note: 'Fast-spiking cortical interneurons. Activation follows the voltage at once; the paper varies its midpoint about −24 mV. No temperature stated, so nothing is scaled.',
});
