// What each figure means, its formula, and who says so (references from memory). Shown beside the figure; the engine's own
// notes are nearer the code.

import type { Forecast } from '../../src-main/contract/results.ts';

export interface Definition {
  readonly title: string;
  readonly formula: string;
  readonly words: string;
  readonly source: string;
}

export const topics = [
  'clamp error',
  'worst error',
  'settling time',
  'access part',
  'cable part',
  'reach',
  'trust distance',
  'clamp bandwidth',
  'largest current',
  'reading',
  'bias',
  'attenuation',
  'input resistance',
  'transfer resistance',
  'numerical uncertainty',
] as const;
export type Topic = (typeof topics)[number];

const ofClamp: readonly Topic[] = [
  'clamp error',
  'worst error',
  'settling time',
  'access part',
  'cable part',
  'reach',
  'trust distance',
  'clamp bandwidth',
];
const ofTwoSites: readonly Topic[] = ['attenuation', 'input resistance', 'transfer resistance'];

/** The topic, or where the forecast has no such figure one that it has: no clamp error stands over a current clamp. */
export function topicWithin(topic: Topic, forecast: Pick<Forecast, 'clamp' | 'dualSite' | 'readings'>): Topic {
  const isMissing =
    (forecast.clamp === null && ofClamp.includes(topic)) ||
    (forecast.dualSite === null && ofTwoSites.includes(topic)) ||
    (forecast.readings.length === 0 && (topic === 'reading' || topic === 'bias'));
  if (!isMissing) return topic;
  if (forecast.clamp !== null) return 'clamp error';
  return forecast.readings.length > 0 ? 'reading' : 'largest current';
}

export const definitions: Readonly<Record<Topic, Definition>> = {
  'clamp error': {
    title: 'Steady clamp error',
    formula: 'error(x) = V(x, t) − V_ideal(t), at the end of the window',
    words:
      'How far the membrane at x is from the level the clamp was told to hold. V_ideal is the dial level imposed on all membrane at once; positive means the membrane is more positive than asked.',
    source: 'Space clamp: Rall 1959, Exp. Neurol. 1:491; Johnston and Brown 1983, J. Neurophysiol. 50:464.',
  },
  'worst error': {
    title: 'Worst clamp error',
    formula: 'the error of largest size within the window, with its sign',
    words:
      'Each place takes its own worst moment, so the picture is not one instant. Right after a step it is nearly the whole step, for the membrane has yet to follow: read it with the settling time.',
    source: 'Definition; the same V_ideal as the steady error.',
  },
  'settling time': {
    title: 'Settling time',
    formula: 'the last t at which |error(x, t)| exceeds the tolerance, from the block’s start',
    words:
      'After that the place stays within the tolerance to the window’s end. A place that is still outside at the end has no settling time in this window.',
    source: 'Definition. The clamped cable’s own time constants: Rall 1969, Biophys. J. 9:1483.',
  },
  'access part': {
    title: 'Access part',
    formula: 'V(clamp’s site) − V_ideal = −I · R_access',
    words:
      'What the access resistance costs at the pipette: the clamp holds the pipette, not the cell. A smaller access resistance, or compensation, repairs this part and no other.',
    source: 'Ohm’s law at steady state; common practice.',
  },
  'cable part': {
    title: 'Cable part',
    formula: 'error(x) − error(clamp’s site)',
    words:
      'What is lost on the way from the clamp’s site to x, along axial resistance and through membrane. Neither access resistance nor compensation touches it.',
    source: 'Rall 1959, Exp. Neurol. 1:491; Jack, Noble and Tsien 1975, Electric Current Flow in Excitable Cells.',
  },
  reach: {
    title: 'Reach',
    formula: 'Σ area with |error| ≤ tolerance ÷ Σ area, at the end of the window',
    words:
      'The share of membrane, spines and axon included, that the clamp holds within the tolerance at the end of the window. The sweep in which it is smallest speaks for the plan. A tolerance in per cent is of |level − holding|; sweeps without a step are left out.',
    source: 'Definition; a tolerance of 5 mV is common practice.',
  },
  'trust distance': {
    title: 'Trust distance',
    formula: 'the smallest path distance at which |error| first exceeds the tolerance',
    words:
      'Along every path from the soma’s surface (the root, without a soma) to a tip, the first place outside the tolerance, interpolated between compartments; the shortest of these counts.',
    source: 'Definition.',
  },
  'clamp bandwidth': {
    title: 'Clamp bandwidth',
    formula: 'f = 1 / (2π · R_access · C)',
    words:
      'The corner at which the access resistance and the whole cell’s capacitance pass half the power. No filter behind the amplifier brings back what is lost here.',
    source: 'One-pole circuit; common practice.',
  },
  'largest current': {
    title: 'Largest current',
    formula: 'max |I| from the pipette into the cell, over all sweeps',
    words:
      'In voltage clamp the amplifier supplies it through the access. In current clamp it is not the command: while the voltage jumps, as in a spike, the stray capacitance of the pipette takes and gives current of its own, C·dV/dt, so that more may enter the cell than is commanded. Compare it with what the headstage can deliver: beyond that range the amplifier saturates and the clamp is lost.',
    source: 'From the predicted recording.',
  },
  reading: {
    title: 'Recorded and true',
    formula: 'measure(recording, window) beside measure(ideal current, window)',
    words:
      'Recorded: taken from the predicted recording. True: the total ionic current of the same membrane under a perfect clamp of all of it, without capacity current, read by the same code in the same window. In current clamp: the same current through perfect pipettes.',
    source:
      'Montnach et al. 2021, Sci. Rep. 11:3282, on access resistance and amplitude; White, Sekar and Kay 1995, J. Neurophysiol. 73:2369, on distance.',
  },
  bias: {
    title: 'Bias',
    formula: 'recorded − true; in words ||recorded| − |true|| ÷ |true|',
    words:
      'Too large and too small go by size, whatever the sign: a current of −666 pA that is −941 reads 29 % too small. Where the signs differ, and for voltages, it is too positive or too negative. The one number speaks for the sweep with the largest relative bias among those whose true value is at least a tenth of the largest: nearer to zero a ratio says nothing.',
    source: 'Definition.',
  },
  attenuation: {
    title: 'Steady attenuation',
    formula: 'A→B: |V_A / V_B| for a steady current at A, no clamp active',
    words:
      'How many times smaller the change arrives than it set out. It has a direction: the thin end is loaded by the thick one, so the way to the soma costs more.',
    source: 'Carnevale and Johnston 1982, J. Neurophysiol. 47:606; gates linearised at the operating point.',
  },
  'input resistance': {
    title: 'Input resistance',
    formula: 'R_A = V_A / I_A, steady, small current',
    words: 'Voltage at a site per unit of current injected there, gates linearised at the operating point.',
    source: 'Rall 1959, Exp. Neurol. 1:491.',
  },
  'transfer resistance': {
    title: 'Transfer resistance',
    formula: 'R_AB = V_B / I_A = V_A / I_B',
    words:
      'Voltage at one site per unit of current at the other; the same both ways, in any tree whose membrane is linear.',
    source: 'Reciprocity: Carnevale and Johnston 1982, J. Neurophysiol. 47:606.',
  },
  'numerical uncertainty': {
    title: 'Numerical uncertainty',
    formula: '|figure − the figure with compartments, time step and table spacing halved|',
    words:
      'How far the arithmetic can be off, with the same sites. It is computed after the rehearsal and reads pending until then. It says nothing about how well the model fits your cell.',
    source: 'Step halving; compartment rule: Hines and Carnevale 2001, Neuroscientist 7:123.',
  },
};
