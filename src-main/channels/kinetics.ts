// Working form of a channel: what the solver evaluates. Formulas keep their papers' units: V in mV, rates in 1/ms.

export interface Gate {
  readonly name: string;
  readonly power: number;
  /** Steady state at V (mV), 0…1. */
  readonly inf: (V: number) => number;
  /** Time constant at V (mV), ms, at the reference temperature. 0 at every V: the gate is at `inf` always. */
  readonly tau: (V: number) => number;
  /** Rates are multiplied by q10^((T − q10Reference)/10). */
  readonly q10: number;
  readonly q10Reference: number;
}

/** I = g·Π gate^power·(V − E). A channel without gates is ohmic. */
export interface Kinetics {
  readonly name: string;
  /** mV, unless the make-up gives another. */
  readonly reversal: number;
  readonly gates: readonly Gate[];
  readonly source: string;
}

/** A published channel, with what a reader must know before using it. */
export interface StoredChannel extends Kinetics {
  /** What carries the current: Na, K, Ca, or Na and K together. */
  readonly ion: 'Na' | 'K' | 'Ca' | 'Na/K';
  /** A few words: kind, authors, year. */
  readonly title: string;
  /** °C at which the rates hold as written; null where the source states none, and then they are not scaled. */
  readonly measuredAt: number | null;
  /** The equations were not read in print: they are from memory, and agree with other transcriptions. */
  readonly fromMemory: boolean;
  /** Preparation, what was left open, and what to mind; plain sentences. */
  readonly note: string;
}

/** Whether a gate follows the voltage at once: its time constant is 0, at every voltage. */
export function isInstant(gate: Gate): boolean {
  return gate.tau(0) === 0;
}
