import type { StoredChannel } from './kinetics.ts';
import { storedChannel } from './stored.ts';

/** F/(RT) at 35 °C, per mV. */
const FRT = 0.037653;

function zeta(V: number): number {
  return -(1.8 + 1 / (1 + Math.exp((V + 40) / 5))) * (V + 1) * FRT;
}

/**
 * A-type potassium conductance of CA1 pyramidal cells, beyond 100 µm, I = g·n·l·(V − E), E = −90 mV.
 *
 *     ζ = −(1.8 + 1/(1 + exp((V + 40)/5)))·(V + 1)·F/(RT)
 *     n∞ = 1/(1 + exp(ζ))               τ_n = max(0.1, exp(0.39·ζ)/(5.873·0.1·(1 + exp(ζ))))
 *     l∞ = 1/(1 + exp(3·(V + 56)·F/(RT)))    τ_l = max(2, 0.26·(V + 50))
 *
 * V in mV, τ in ms, at 35 °C (5.873 = 5^1.1 brings data of 24 °C there), F/(RT) = 0.037653 per mV; rates of n × 5 per
 * 10 °C, l not scaled. The floors are part of the published fit; steady states are taken as they are at 35 °C.
 *
 * @source Hoffman DA, Magee JC, Colbert CM, Johnston D (1997), Nature 387:869–875; formulas in Migliore M, Hoffman DA, Magee
 *         JC, Johnston D (1999), J Comput Neurosci 7:5–15 (from memory; agrees with several transcriptions).
 */
export const kADistalHoffman1997: StoredChannel = storedChannel({
  name: 'k-a-distal-hoffman-1997',
  ion: 'K',
  title: 'K A-type distal, Hoffman 1997',
  reversal_mV: -90,
  measuredAt_C: 35,
  gates: [
    {
      name: 'n',
      power: 1,
      q10: 5,
      inf: (V) => 1 / (1 + Math.exp(zeta(V))),
      tau: (V) => Math.max(0.1, Math.exp(0.39 * zeta(V)) / (5.873 * 0.1 * (1 + Math.exp(zeta(V))))),
    },
    {
      name: 'l',
      power: 1,
      inf: (V) => 1 / (1 + Math.exp(3 * (V + 56) * FRT)),
      tau: (V) => Math.max(2, 0.26 * (V + 50)),
    },
  ],
  source:
    'Hoffman DA, Magee JC, Colbert CM, Johnston D (1997), Nature 387:869–875; formulas as in Migliore M, Hoffman DA, Magee JC, Johnston D (1999), J Comput Neurosci 7:5–15',
  fromMemory: true,
  note: 'CA1 pyramidal cells, beyond 100 µm. The density rises about linearly with distance, some fivefold to 350 µm. Time constants have floors of 0.1 and 2 ms; inactivation is not scaled with temperature; steady states hold at 35 °C.',
});
