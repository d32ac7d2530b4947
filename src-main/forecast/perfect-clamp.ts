// The truth a voltage clamp is held against: the same membrane, all of it on command at once.
import type { Grid } from '../cell/grid.ts';
import { isInstant, type Gate, type Kinetics } from '../channels/kinetics.ts';
import type { CommandPiece } from '../protocol/command.ts';
import { fromSi, type Ampere, type Second, type Siemens, type Volt } from '../units/si.ts';

/** A channel of the whole cell as one: gates are everywhere the same, because the voltage is. */
interface WholeChannel {
  /** Σ over compartments, S. */
  readonly G: Siemens;
  /** Σ G·E, A. With it, any number of reversal potentials costs one product. */
  readonly GE: Ampere;
  readonly gates: readonly Gate[];
  /** Per gate: whether it follows the voltage at once, and needs no state. */
  readonly instant: readonly boolean[];
  readonly x: Float64Array;
}

export interface PerfectClampInput {
  readonly grid: Pick<Grid, 'count' | 'conductances'>;
  readonly kinetics: ReadonlyMap<string, Kinetics>;
  readonly temperature: number;
  /** V per compartment at which gates stand steady at time 0. */
  readonly start: Float64Array;
}

/** A cell under a perfect clamp. Commands are played one after another; the gates carry over. */
export interface PerfectClamp {
  /** Plays a command without looking. */
  readonly pass: (command: readonly CommandPiece[], step: Second) => void;
  /** Plays a command; the current at samples 0, h, 2h ..., A, outward positive. */
  readonly play: (
    command: readonly CommandPiece[],
    timing: { readonly step: Second; readonly sampling: Second; readonly samples: number },
  ) => Float64Array;
}

/**
 * Current of the whole membrane under a perfect space clamp: V_ideal(t) imposed everywhere, all ionic current, no
 * capacity current, no filter, no noise.
 *
 *     I(t) = Σ_c Π x^p · (V·ΣG − ΣG·E),   dx/dt = (x∞(V) − x)/τ(V)
 *
 * Exact in time where the command is level (gates relax exponentially); on ramps, steps of `step` with the voltage at
 * their middle, second order.
 *
 * @source Hodgkin AL, Huxley AF (1952), J Physiol 117:500–544, eqs 7, 12 (gates under a step), from memory.
 */
export function perfectClamp(input: PerfectClampInput): PerfectClamp {
  const channels = wholeChannels(input);
  const speed = (gate: Gate): number => gate.q10 ** ((input.temperature - gate.q10Reference) / 10);

  const advance = (V: Volt, duration: Second): void => {
    const mV = fromSi(V, 'mV');
    for (const { gates, x } of channels) {
      gates.forEach((gate, g) => {
        const inf = gate.inf(mV);
        const tau = gate.tau(mV) / speed(gate) / 1e3;
        x[g] = inf + ((x[g] ?? NaN) - inf) * Math.exp(-duration / tau);
      });
    }
  };
  const current = (V: Volt): Ampere => {
    const mV = fromSi(V, 'mV');
    let total = 0;
    for (const { G, GE, gates, instant, x } of channels) {
      let open = 1;
      gates.forEach((gate, g) => {
        open *= (instant[g] === true ? gate.inf(mV) : (x[g] ?? NaN)) ** gate.power;
      });
      total += open * (V * G - GE);
    }
    return total;
  };
  /** From `from` to `to` within one piece. */
  const along = (piece: CommandPiece, from: Second, to: Second, step: Second): void => {
    if (to <= from) return;
    if (piece.v0 === piece.v1) {
      advance(piece.v0, to - from);
      return;
    }
    const slope = (piece.v1 - piece.v0) / (piece.end - piece.start);
    const steps = Math.max(1, Math.ceil((to - from) / step - 1e-6));
    const each = (to - from) / steps;
    for (let s = 0; s < steps; s += 1) advance(piece.v0 + slope * (from + (s + 0.5) * each - piece.start), each);
  };

  return {
    pass: (command, step) => {
      for (const piece of command) along(piece, piece.start, piece.end, step);
    },
    play: (command, { step, sampling, samples }) => {
      const values = new Float64Array(samples);
      const hair = 1e-6 * sampling;
      let index = 0;
      command.forEach((piece, p) => {
        let at = piece.start;
        const slope = (piece.v1 - piece.v0) / (piece.end - piece.start);
        const isLast = p === command.length - 1;
        while (index < samples && (isLast || index * sampling < piece.end - hair)) {
          const time = Math.max(at, Math.min(index * sampling, piece.end));
          along(piece, at, time, step);
          at = time;
          values[index] = current(piece.v0 + slope * (time - piece.start));
          index += 1;
        }
        along(piece, at, piece.end, step);
      });
      return values;
    },
  };
}

/** Channels summed over the cell, apart where the gates start from different voltages. */
function wholeChannels({ grid, kinetics, start }: PerfectClampInput): WholeChannel[] {
  return grid.conductances.flatMap(({ channel, conductance, reversal }) => {
    const gates = kinetics.get(channel)?.gates ?? [];
    const sums = new Map<number, { G: number; GE: number }>();
    for (let k = 0; k < grid.count; k += 1) {
      const g = conductance[k] ?? 0;
      if (g === 0) continue;
      const from = gates.length === 0 ? 0 : (start[k] ?? NaN);
      const sum = sums.get(from) ?? { G: 0, GE: 0 };
      sums.set(from, { G: sum.G + g, GE: sum.GE + g * (reversal[k] ?? NaN) });
    }
    return [...sums].map(([from, { G, GE }]) => ({
      G,
      GE,
      gates,
      instant: gates.map(isInstant),
      x: Float64Array.from(gates, (gate) => gate.inf(fromSi(from, 'mV'))),
    }));
  });
}
