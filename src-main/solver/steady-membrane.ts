// The membrane with every gate at its steady state: current and slope by voltage, and what it does at a frequency.
import type { Grid } from '../cell/grid.ts';
import type { Gate, Kinetics } from '../channels/kinetics.ts';
import type { Siemens, Volt } from '../units/si.ts';
import { rateFactor } from './gate-rows.ts';
import { gatedChannels, raised } from './membrane.ts';

/** Half the voltage difference over which a steady state's slope is taken, mV: 1e-10 of the slope is lost. */
const reach_mV = 1e-3;

/** d inf/dV at V (V), per volt, by central difference. */
export function steadySlope(gate: Gate, V: Volt): number {
  return (gate.inf(1e3 * V + reach_mV) - gate.inf(1e3 * V - reach_mV)) / (2e-3 * reach_mV);
}

/** Per compartment: current of all channels (A, outward positive), chord and slope conductance (S), gates steady. */
export interface SteadyMembrane {
  readonly current: Float64Array;
  /** Σ g·Π x^p: what the membrane conducts while the gates stay. */
  readonly chord: Float64Array;
  /** dI/dV with the gates following. */
  readonly slope: Float64Array;
  /** One per gate of each channel: the part of the slope that comes with the gate's own delay. */
  readonly delayed: readonly DelayedSlope[];
}

export interface DelayedSlope {
  /** S; 0 where the channel is absent. */
  readonly conductance: Float64Array;
  /** s. */
  readonly tau: Float64Array;
}

/**
 * The membrane at voltages V (V, per compartment), each gate at its steady state. Linearised, a channel's admittance is
 * its chord conductance and, per gate, g·p·x^(p−1)·Π_other·(V − E)·x∞'/(1 + iωτ).
 *
 * @source Koch C (1984), Biol Cybern 50:15–33 (from memory); follows from the channel equations by differentiation.
 */
export function steadyMembrane(
  grid: Grid,
  kinetics: ReadonlyMap<string, Kinetics>,
  temperature: number,
  V: Float64Array,
): SteadyMembrane {
  const { count } = grid;
  const current = new Float64Array(count);
  const chord = new Float64Array(count);
  const slope = new Float64Array(count);
  const delayed: DelayedSlope[] = [];
  const gated = gatedChannels(grid, kinetics);
  const gatedNames = new Set(gated.map(({ name }) => name));
  for (const { channel, conductance, reversal } of grid.conductances) {
    if (gatedNames.has(channel)) continue;
    for (let k = 0; k < count; k++) {
      const G = conductance[k]!;
      current[k] = current[k]! + G * (V[k]! - reversal[k]!);
      chord[k] = chord[k]! + G;
      slope[k] = slope[k]! + G;
    }
  }
  for (const { kinetics: channel, conductance, reversal } of gated) {
    const parts = channel.gates.map(() => ({ conductance: new Float64Array(count), tau: new Float64Array(count) }));
    for (let k = 0; k < count; k++) {
      const G = conductance[k]!;
      if (G === 0) continue;
      const drive = V[k]! - reversal[k]!;
      const open = G * openShare(channel.gates, V[k]!, -1);
      current[k] = current[k]! + open * drive;
      chord[k] = chord[k]! + open;
      slope[k] = slope[k]! + open;
      channel.gates.forEach((gate, s) => {
        const x = gate.inf(1e3 * V[k]!);
        const rise = gate.power * (gate.power === 1 ? 1 : raised(x, gate.power - 1)) * steadySlope(gate, V[k]!);
        const own = G * openShare(channel.gates, V[k]!, s) * rise * drive;
        parts[s]!.conductance[k] = own;
        parts[s]!.tau[k] = (1e-3 * gate.tau(1e3 * V[k]!)) / rateFactor(gate, temperature);
        slope[k] = slope[k]! + own;
      });
    }
    delayed.push(...parts);
  }
  return { current, chord, slope, delayed };
}

/** Π x∞^p over the gates but `without`. */
function openShare(gates: readonly Gate[], V: Volt, without: number): Siemens {
  let share = 1;
  for (let s = 0; s < gates.length; s++) {
    if (s !== without) share *= raised(gates[s]!.inf(1e3 * V), gates[s]!.power);
  }
  return share;
}
