// A channel of the cell's own, from its document to what the solver evaluates.
import type { ChannelDocument, GateDocument } from '../contract/documents.ts';
import type { RefusalData } from '../contract/refusal.ts';
import { Refusal } from '../units/refuse.ts';
import type { Gate, Kinetics } from './kinetics.ts';
import { rateOf } from './rate-forms.ts';

/** Where a channel's rates must make sense, mV: wider than any membrane is taken, narrow enough for steep formulas. */
const checkedFrom = -120;
const checkedTo = 80;

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

function faultsOf(gate: Gate, place: string): RefusalData[] {
  for (let V = checkedFrom; V <= checkedTo; V++) {
    const inf = gate.inf(V);
    const tau = gate.tau(V);
    // A hair of room for rounding in sums of exponentials.
    const infFits = inf >= -1e-9 && inf <= 1 + 1e-9;
    if (infFits && tau >= 0) continue;
    return [
      {
        code: 'quantity-out-of-range',
        thing: infFits ? 'time constant' : 'steady state',
        place: `${place}.gates.${gate.name} at ${V} mV`,
        value: infFits ? `${tau} ms` : String(inf),
        remedy: infFits
          ? 'change the rates so that the time constant is not negative'
          : 'change the rates so that the steady state stays between 0 and 1',
      },
    ];
  }
  return [];
}

/**
 * The working form of a channel document.
 *
 * @throws Refusal `quantity-out-of-range`, one per gate at fault, where between −120 and 80 mV a steady state leaves
 *         0…1 or a time constant is negative or not a number. `place` is the document's path.
 */
export function kineticsOf(channel: ChannelDocument, place = `cell.channels.${channel.name}`): Kinetics {
  const gates = channel.gates.map(gateOf);
  const [first, ...rest] = gates.flatMap((gate) => faultsOf(gate, place));
  if (first !== undefined) throw new Refusal([first, ...rest]);
  return { name: channel.name, reversal: channel.reversal_mV, gates, source: channel.source ?? 'the user' };
}
