// Working form of a channel: what the solver evaluates. Formulas keep their papers' units: V in mV, rates in 1/ms.

export interface Gate {
  readonly name: string;
  readonly power: number;
  /** Steady state at V (mV), 0…1. */
  readonly inf: (V: number) => number;
  /** Time constant at V (mV), ms, at the reference temperature. */
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
