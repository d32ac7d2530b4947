// The curves of a channel's gates, as series of a chart. Pure.
import type { ListedChannel, ListedGate } from '../../src-main/contract/requests.ts';
import type { Series } from '../charts/series.ts';

const looks = [
  { paint: { token: '--accent' }, stroke: 'solid' },
  { paint: { token: '--ink' }, stroke: 'dashed' },
  { paint: { token: '--ink-3' }, stroke: 'dotted' },
] as const;

/** Whether the gate follows the voltage at once: it has no time constant. */
export function followsAtOnce(gate: ListedGate): boolean {
  return gate.tau_ms.every((tau) => tau === 0);
}

/** Steady state of each gate over voltage. */
export function steadySeries(channel: ListedChannel): Series[] {
  return channel.gates.map((gate, g) => curve(gate, g, gate.inf));
}

/** Time constant of each gate that has one, drawn like its steady state. */
export function timeSeries(channel: ListedChannel): Series[] {
  return channel.gates.flatMap((gate, g) => (followsAtOnce(gate) ? [] : [curve(gate, g, gate.tau_ms)]));
}

function curve(gate: ListedGate, g: number, y: Float64Array): Series {
  const look = looks[g % looks.length] ?? looks[0];
  return { key: gate.name, label: gate.name, x: gate.voltages_mV, y, drawn: 'line', ...look };
}

const digits = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** "m³·h": what the conductance is multiplied by. */
export function gatesWords(gates: readonly { readonly name: string; readonly power: number }[]): string {
  return gates.map(({ name, power }) => (power === 1 ? name : `${name}${digits[power] ?? ''}`)).join('·');
}
