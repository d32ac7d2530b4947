// The pipettes of a sweep: their commands in time, and what each puts into the rows of the system.
import type { CommandPiece } from '../protocol/command.ts';
import { refuse } from '../units/refuse.ts';
import { fromSi, type Ampere, type Farad, type Ohm, type Second, type Siemens, type Volt } from '../units/si.ts';
import type { SolverPipette, SweepState } from './run.ts';
import { slopeOf } from './timeline.ts';

/**
 * How a pipette meets the cell.
 *
 *  - `imposed`: ideal voltage clamp; the compartment's voltage is the command.
 *  - `held`: voltage clamp through access resistance; the command drives 1/Rs.
 *  - `injecting`: current clamp; the command goes straight into the compartment (no stray capacitance, or no access).
 *  - `behind a node`: current clamp; stray capacitance and access resistance make a node of the pipette's own.
 */
export interface Electrode {
  readonly way: 'imposed' | 'held' | 'injecting' | 'behind a node';
  readonly compartment: number;
  readonly access: Ohm;
  /** 1/access; 0 for an ideal pipette. */
  readonly g: Siemens;
  readonly stray: Farad;
  readonly bridge: Ohm;
  readonly pieces: readonly CommandPiece[];
  /** The piece in force. */
  piece: number;
  /** Voltage of the pipette's own node. */
  nodeV: Volt;
}

/**
 * Electrodes from pipettes, at the start of a sweep.
 *
 * @throws Refusal `quantity-out-of-range` for two ideal voltage clamps in one compartment: no current is defined.
 */
export function electrodesOf(pipettes: readonly SolverPipette[], start: SweepState): Electrode[] {
  const electrodes = pipettes.map((pipette, p): Electrode => {
    const { compartment, access, stray, bridge, command } = pipette;
    const own = start.V[compartment]!;
    return {
      way: wayOf(pipette),
      compartment,
      access,
      g: access === 0 ? 0 : 1 / access,
      stray,
      bridge,
      pieces: command,
      piece: 0,
      nodeV: start.pipetteV?.[p] ?? own,
    };
  });
  refuseRivals(pipettes);
  return electrodes;
}

export function wayOf(pipette: Pick<SolverPipette, 'mode' | 'access' | 'stray'>): Electrode['way'] {
  if (pipette.mode === 'voltage clamp') return pipette.access === 0 ? 'imposed' : 'held';
  return pipette.access > 0 && pipette.stray > 0 ? 'behind a node' : 'injecting';
}

/** @throws Refusal `quantity-out-of-range` for two ideal voltage clamps in one compartment. */
export function refuseRivals(
  pipettes: readonly Pick<SolverPipette, 'letter' | 'mode' | 'access' | 'stray' | 'compartment'>[],
): void {
  const ideal = pipettes.filter((pipette) => wayOf(pipette) === 'imposed');
  const rival = ideal.find((one, i) => ideal.some((other, j) => j < i && other.compartment === one.compartment));
  if (rival === undefined) return;
  refuse('quantity-out-of-range', {
    thing: 'access resistance',
    place: `pipette ${rival.letter}`,
    value: `${fromSi(rival.access, 'MOhm')} MΩ beside another ideal voltage clamp in the same compartment`,
    remedy: 'give one of the two an access resistance above 0, or another site',
  });
}

/** Passes to the piece in force from `time` on. Times within `slack` count as equal. */
export function turnPieces(electrodes: readonly Electrode[], time: Second, slack: Second): void {
  for (const electrode of electrodes) {
    while (electrode.piece < electrode.pieces.length - 1 && electrode.pieces[electrode.piece]!.end <= time + slack) {
      electrode.piece++;
    }
  }
}

/** The command at `time` by the piece in force; beyond the last piece its final level. A sweep without pieces: 0. */
export function commandAt(electrode: Electrode, time: Second): number {
  const piece = electrode.pieces[electrode.piece];
  if (piece === undefined) return 0;
  if (piece.v1 === piece.v0) return piece.v0;
  const way = (time - piece.start) / (piece.end - piece.start);
  return way >= 1 ? piece.v1 : piece.v0 + way * (piece.v1 - piece.v0);
}

/** Slope of the command, per second. */
export function commandSlope(electrode: Electrode): number {
  const piece = electrode.pieces[electrode.piece];
  return piece === undefined ? 0 : slopeOf(piece);
}

/** Capacitance the electrode adds to its compartment: a stray with no access resistance before it. */
export function addedCapacitance(electrode: Electrode): Farad {
  return electrode.way === 'injecting' && electrode.access === 0 ? electrode.stray : 0;
}

/** Adds the electrode to its compartment's pivot, for a step with capacitance weight `weight` = 2/h. */
export function addToPivot(electrode: Electrode, D: Float64Array, weight: number): void {
  const { compartment: c, g, stray } = electrode;
  if (electrode.way === 'held') D[c] = D[c]! + g;
  else if (electrode.way === 'behind a node') {
    const own = stray * weight;
    D[c] = D[c]! + (g * own) / (own + g);
  }
}

/** Adds the electrode to its compartment's right side at a command level. */
export function addToRight(electrode: Electrode, R: Float64Array, command: number, weight: number): void {
  const { compartment: c, g, stray } = electrode;
  if (electrode.way === 'held') R[c] = R[c]! + g * command;
  else if (electrode.way === 'injecting') R[c] = R[c]! + command;
  else if (electrode.way === 'behind a node') {
    const own = stray * weight;
    R[c] = R[c]! + (g * (own * electrode.nodeV + command)) / (own + g);
  }
}

/** The node's voltage that belongs to the compartment's solution x. */
export function nodeSolution(electrode: Electrode, x: Volt, command: Ampere, weight: number): Volt {
  const own = electrode.stray * weight;
  return (own * electrode.nodeV + command + electrode.g * x) / (own + electrode.g);
}

/** Current that enters the cell from any electrode but an ideal clamp. */
export function enteringCurrent(electrode: Electrode, V: Volt, command: number): Ampere {
  switch (electrode.way) {
    case 'held':
      return (command - V) * electrode.g;
    case 'behind a node':
      return (electrode.nodeV - V) * electrode.g;
    case 'injecting':
      return command;
    case 'imposed':
      throw new Error('the current of an ideal clamp follows from its compartment');
    default:
      return electrode.way satisfies never;
  }
}

/** Current clamp: the pipette's voltage less the bridge's share. */
export function recordedVoltage(electrode: Electrode, V: Volt, command: Ampere): Volt {
  const pipette = electrode.way === 'behind a node' ? electrode.nodeV : V + command * electrode.access;
  return pipette - command * electrode.bridge;
}
