import type { Gate } from '../channels/kinetics.ts';
import { storedChannels } from '../channels/library.ts';
import type { ListedChannel, ListedGate } from '../contract/requests.ts';
import { rateFactor } from '../solver/gate-rows.ts';

/** Voltages the curves are drawn over, mV: where membranes are held and spikes go, 1 mV apart. */
const lowest_mV = -120;
const highest_mV = 80;

/**
 * The published channels in the order of the library, each gate's steady state and time constant from −120 to 80 mV.
 *
 * @param temperature °C at which time constants are given: τ/q10^((T − reference)/10).
 */
export function listedChannels(temperature: number): ListedChannel[] {
  return [...storedChannels.values()].map((channel) => ({
    id: channel.name,
    title: channel.title,
    ion: channel.ion,
    reversal_mV: channel.reversal,
    temperature_C: channel.measuredAt,
    source: channel.source,
    fromMemory: channel.fromMemory,
    note: channel.note,
    gates: channel.gates.map((gate) => listedGate(gate, temperature)),
  }));
}

function listedGate(gate: Gate, temperature: number): ListedGate {
  const voltages_mV = Float64Array.from({ length: highest_mV - lowest_mV + 1 }, (_, i) => lowest_mV + i);
  const factor = rateFactor(gate, temperature);
  return {
    name: gate.name,
    power: gate.power,
    q10: gate.q10,
    voltages_mV,
    inf: voltages_mV.map((V) => gate.inf(V)),
    tau_ms: voltages_mV.map((V) => gate.tau(V) / factor),
  };
}
