// Channel conductances, summed piece by piece into compartments.
import type { Siemens, Volt } from '../units/si.ts';
import type { GridConductance } from './grid.ts';

/** Sums conductances by channel; where parts of one compartment differ in reversal, g·E is summed, which is exact. */
export class ConductanceSums {
  readonly #count: number;
  readonly #sums = new Map<string, { channel: string; g: Float64Array; gE: Float64Array; fallback: Volt }>();

  constructor(count: number) {
    this.#count = count;
  }

  /** Adds `g` of a channel to compartment k. A reversal of NaN is the stored channel's own. */
  add(k: number, channel: string, g: Siemens, reversal: Volt): void {
    const key = `${Number.isNaN(reversal) ? 'own' : 'given'} ${channel}`;
    let sum = this.#sums.get(key);
    if (sum === undefined) {
      sum = { channel, g: new Float64Array(this.#count), gE: new Float64Array(this.#count), fallback: reversal };
      this.#sums.set(key, sum);
    }
    sum.g[k]! += g;
    sum.gE[k]! += g * reversal;
  }

  /** In order of first mention. A compartment without the channel has conductance 0 and a finite or NaN reversal as the rest. */
  list(): GridConductance[] {
    return [...this.#sums.values()].map(({ channel, g, gE, fallback }) => ({
      channel,
      conductance: g,
      reversal: gE.map((product, k) => (g[k]! > 0 ? product / g[k]! : fallback)),
    }));
  }
}
