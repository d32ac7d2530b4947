// One step of a sweep: the gates first, then the voltages, every compartment and pipette at once.
import type { Second } from '../units/si.ts';
import { addToPivot, addToRight, commandAt, nodeSolution, type Electrode } from './electrodes.ts';
import { advanceGates } from './membrane.ts';
import { eliminate, reduce, substitute } from './tree.ts';
import type { Workspace } from './workspace.ts';

export interface StepPlace {
  readonly time: Second;
  readonly h: Second;
  /** Where the step ends; not always time + h to the last bit. */
  readonly end: Second;
  /** How far the gates go: from the middle of the step before to the middle of this one. */
  readonly advance: Second;
  /** The middle of this step, in lengths of the step before; 0 after a break. */
  readonly lead: number;
}

/** Ideal clamps put their compartments where the command is. */
export function impose(electrodes: readonly Electrode[], V: Float64Array, time: Second): void {
  for (const electrode of electrodes) {
    if (electrode.way === 'imposed') V[electrode.compartment] = commandAt(electrode, time);
  }
}

/** Takes the gates alone forward, at the present voltages. */
export function bringGatesUp(work: Workspace, advance: Second): void {
  // The rows that the gates fill are scratch here.
  if (advance > 0) advanceGates(work.membrane, advance, work.V, work.D, work.R, 0);
}

/**
 * A step by the trapezoidal rule: a backward half step, then as far again. False where the voltages are not finite any more.
 *
 * @source Crank J, Nicolson P (1947), Proc Camb Phil Soc 43:50–67 (from memory).
 */
export function plainStep(work: Workspace, at: StepPlace): boolean {
  const { tree, electrodes, capacitance, fixedD, fixedR, V, D, R, inverse } = work;
  const { count } = tree;
  const weight = 2 / at.h;
  const middle = at.time + at.h / 2;
  for (let k = 0; k < count; k++) {
    const c = weight * capacitance[k]!;
    D[k] = fixedD[k]! + c;
    R[k] = fixedR[k]! + c * V[k]!;
  }
  advanceGates(work.membrane, at.advance, V, D, R, at.lead);
  addPivots(electrodes, D, weight);
  addCommands(electrodes, D, R, middle, weight);
  eliminate(tree, D, R, inverse);
  substitute(tree, R, inverse);
  for (const electrode of electrodes) {
    if (electrode.way === 'behind a node') {
      electrode.nodeV = 2 * solvedNode(electrode, R, middle, weight) - electrode.nodeV;
    }
  }
  for (let k = 0; k < count; k++) V[k] = 2 * R[k]! - V[k]!;
  impose(electrodes, V, at.end);
  // A fault anywhere reaches the root in the same solve.
  return Number.isFinite(R[0]);
}

/**
 * A step soon after a break, `elapsed` before it begins: what decays faster than a step must die out instead of ringing.
 * The voltages go in parts that start at 1/64 of `regular` and grow with the time since the break, each a backward step
 * and two backward half steps, extrapolated: second order, and what is too fast to follow vanishes. The gates go once.
 *
 * @source Richardson extrapolation of the backward Euler rule, L-stable: Hairer E, Wanner G (1996), Solving Ordinary
 *         Differential Equations II, IV.9 (from memory). Damping after a jump: Rannacher R (1984), Numer Math 43:309–327
 *         (from memory).
 */
export function dampedStep(work: Workspace, at: StepPlace, elapsed: Second, regular: Second): boolean {
  const { V, D, R, openD, openR, fixedD, fixedR } = work;
  D.set(fixedD);
  R.set(fixedR);
  advanceGates(work.membrane, at.advance, V, D, R, at.lead);
  openD.set(D);
  openR.set(R);
  let finite = true;
  let gone = 0;
  while (gone < at.h) {
    const part = Math.min(regular, Math.max(regular / 64, (elapsed + gone) / 2));
    // No crumbs: a rest of less than half a part goes with it.
    const last = at.h - gone < 1.5 * part;
    const h = last ? at.h - gone : part;
    finite = dampedPart(work, h, last ? at.end : at.time + gone + h) && finite;
    gone = last ? at.h : gone + h;
  }
  return finite;
}

/** Voltages from here to `end`, h later, at fixed conductances. */
function dampedPart(work: Workspace, h: Second, end: Second): boolean {
  const { tree, electrodes, V, R, inverse, whole } = work;
  const { count } = tree;
  const nodesBefore = electrodes.map(({ nodeV }) => nodeV);
  backwardRows(work, 1 / h, V);
  addCommands(electrodes, work.D, R, end, 1 / h);
  eliminate(tree, work.D, R, inverse);
  substitute(tree, R, inverse);
  whole.set(R);
  const nodesWhole = electrodes.map((electrode) => solvedNode(electrode, R, end, 1 / h));

  const weight = 2 / h;
  const middle = end - h / 2;
  backwardRows(work, weight, V);
  addCommands(electrodes, work.D, R, middle, weight);
  eliminate(tree, work.D, R, inverse);
  substitute(tree, R, inverse);
  for (const electrode of electrodes) electrode.nodeV = solvedNode(electrode, R, middle, weight);
  const { capacitance, openR } = work;
  for (let k = 0; k < count; k++) R[k] = openR[k]! + weight * capacitance[k]! * R[k]!;
  addCommands(electrodes, work.D, R, end, weight);
  reduce(tree, R, inverse);
  substitute(tree, R, inverse);
  electrodes.forEach((electrode, e) => {
    const halves = solvedNode(electrode, R, end, weight);
    electrode.nodeV = electrode.way === 'behind a node' ? 2 * halves - nodesWhole[e]! : nodesBefore[e]!;
  });
  for (let k = 0; k < count; k++) V[k] = 2 * R[k]! - whole[k]!;
  impose(electrodes, V, end);
  return Number.isFinite(R[0]);
}

/** The rows of a backward step of capacitance weight `weight`, without commands. */
function backwardRows(work: Workspace, weight: number, V: Float64Array): void {
  const { capacitance, openD, openR, D, R } = work;
  for (let k = 0; k < D.length; k++) {
    const c = weight * capacitance[k]!;
    D[k] = openD[k]! + c;
    R[k] = openR[k]! + c * V[k]!;
  }
  addPivots(work.electrodes, D, weight);
}

function addPivots(electrodes: readonly Electrode[], D: Float64Array, weight: number): void {
  for (const electrode of electrodes) addToPivot(electrode, D, weight);
}

/** Puts the commands at `time` into the rows; an ideal clamp's row becomes V = command. */
function addCommands(
  electrodes: readonly Electrode[],
  D: Float64Array,
  R: Float64Array,
  time: Second,
  weight: number,
): void {
  for (const electrode of electrodes) addToRight(electrode, R, commandAt(electrode, time), weight);
  for (const electrode of electrodes) {
    if (electrode.way !== 'imposed') continue;
    D[electrode.compartment] = 1;
    R[electrode.compartment] = commandAt(electrode, time);
  }
}

/** The node's voltage by the solution R. */
function solvedNode(electrode: Electrode, R: Float64Array, time: Second, weight: number): number {
  return nodeSolution(electrode, R[electrode.compartment]!, commandAt(electrode, time), weight);
}
