// Published kinetics at a voltage, in the order of tables: steady state of each gate, then its time constant where it has one.
import { isInstant, type Gate, type Kinetics } from '../../src-main/channels/kinetics.ts';

/** Per gate: inf, then τ in ms unless the gate follows at once. At the temperature the rates were given at. */
export function gateValues(channel: Kinetics, V: number): number[] {
  return channel.gates.flatMap((gate) => (isInstant(gate) ? [gate.inf(V)] : [gate.inf(V), gate.tau(V)]));
}

/** Each value's relative distance from what is expected, the largest. */
export function worstOf(found: readonly number[], expected: readonly number[]): number {
  if (found.length !== expected.length) throw new Error(`${found.length} values for ${expected.length}`);
  return Math.max(...found.map((value, i) => Math.abs(value / expected[i]! - 1)));
}

/** Opening rate α = inf/τ, 1/ms. */
export const opening = (gate: Gate, V: number): number => gate.inf(V) / gate.tau(V);
/** Closing rate β = (1 − inf)/τ, 1/ms. */
export const closing = (gate: Gate, V: number): number => (1 - gate.inf(V)) / gate.tau(V);
