// A channel of the cell's own, from its document to what the solver evaluates.
import type { ChannelDocument, GateDocument } from '../contract/documents.ts';
import type { Gate, Kinetics } from './kinetics.ts';
import { rateOf } from './rate-forms.ts';

/**
 * Steady state and time constant from opening and closing rates.
 *
 *     inf = α/(α + β)     τ = 1/(α + β)
 *
 * Where both rates vanish the gate stays as it is: τ = ∞.
 *
 * @source Hodgkin AL, Huxley AF (1952), J Physiol 117:500–544, eqs 8–11 (from memory).
 */
export function fromRates(
  alpha: (V: number) => number,
  beta: (V: number) => number,
): { inf: (V: number) => number; tau: (V: number) => number } {
  return {
    inf(V) {
      const opening = alpha(V);
      const both = opening + beta(V);
      return both === 0 ? 0 : opening / both;
    },
    tau: (V) => 1 / (alpha(V) + beta(V)),
  };
}

function gateOf(gate: GateDocument): Gate {
  const { name, power, q10, q10Reference_C: q10Reference } = gate;
  const course =
    'alpha' in gate
      ? fromRates(rateOf(gate.alpha), rateOf(gate.beta))
      : { inf: rateOf(gate.inf), tau: rateOf(gate.tau) };
  return { name, power, q10, q10Reference, ...course };
}

/** The working form of a channel document. The rates are taken as they are: whether they make sense is checked with the plan. */
export function kineticsOf(channel: ChannelDocument): Kinetics {
  const { name, reversal_mV: reversal, source } = channel;
  return { name, reversal, gates: channel.gates.map(gateOf), source: source ?? 'the user' };
}
