// The sentences a forecast must not be read without.
import { withUnit } from '../units/format.ts';
import { fromSi } from '../units/si.ts';
import type { LaidSweep } from '../protocol/sweeps.ts';
import type { PreparedPlan } from '../solver/prepare.ts';
import { clampTarget, referenceClamp } from './clamp-sweep.ts';
import type { RehearsedSweep } from './sweep-rehearsal.ts';

/** Assumptions and cautions of a plan's forecast, most telling first. */
export function forecastNotes(prepared: PreparedPlan, done: readonly RehearsedSweep[]): string[] {
  return [
    ...unfinished(prepared, done),
    ...prepared.start().notes,
    ...aboutClamps(prepared),
    ...aboutSteps(prepared),
    ...aboutReadings(prepared),
    'Levels are those on the dial: no junction potential is taken off.',
    'Reach counts membrane by its area, axon and spines included.',
  ];
}

function unfinished({ laidOut }: PreparedPlan, done: readonly RehearsedSweep[]): string[] {
  const missing = laidOut.count - done.length;
  return missing === 0 ? [] : [`${missing} of ${laidOut.count} sweeps did not finish and are left out.`];
}

function aboutClamps(prepared: PreparedPlan): string[] {
  const clamps = prepared.pipettes.filter(({ mode }) => mode === 'voltage clamp');
  const reference = referenceClamp(prepared);
  if (reference === undefined) return ['No pipette is in voltage clamp, so there is no clamp error.'];
  const ideal = clamps.filter(({ access }) => access === 0).map(({ letter }) => letter);
  const notes = ideal.map((letter) => `Pipette ${letter} is an ideal clamp: its site is on command at once.`);
  if (clamps.length > 1) {
    const differ = commandsDiffer(
      prepared.laidOut.sweep(0),
      clamps.map(({ letter }) => letter),
    );
    notes.push(
      differ
        ? `The two clamps are given different commands; clamp error is told against pipette ${reference.letter}.`
        : `Both clamps are given the same command; the access part of the error is that of pipette ${reference.letter}.`,
    );
  }
  return notes;
}

function commandsDiffer(sweep: LaidSweep, letters: readonly string[]): boolean {
  const [first, ...others] = sweep.lanes.filter(({ pipette }) => letters.includes(pipette));
  return others.some(({ command }) => JSON.stringify(command) !== JSON.stringify(first?.command));
}

function aboutSteps(prepared: PreparedPlan): string[] {
  if (prepared.clampWindow === null) return [];
  const left: number[] = [];
  for (let sweep = 0; sweep < prepared.laidOut.count; sweep += 1) {
    if (clampTarget(prepared, prepared.laidOut.sweep(sweep)) === null) left.push(sweep + 1);
  }
  if (left.length === 0) return [];
  const which = left.length > 6 ? `${left.slice(0, 6).join(', ')} …` : left.join(', ');
  return [`Without a step to judge in the clamp window, and so left out of reach: sweep ${which}.`];
}

function aboutReadings(prepared: PreparedPlan): string[] {
  const { plan, pipettes } = prepared;
  const readBy = new Set(plan.protocol.readings.map(({ pipette }) => pipette));
  const clamps = pipettes.filter(({ mode }) => mode === 'voltage clamp');
  const notes: string[] = [];
  if (clamps.some(({ letter }) => readBy.has(letter))) {
    notes.push(
      clamps.length > 1
        ? 'The current of the cell divides between the two clamps, so neither reading has a true value of its own.'
        : 'True currents are all ionic current of the cell under a perfect space clamp, without capacity current.',
    );
  }
  if (pipettes.some(({ mode, letter }) => mode === 'current clamp' && readBy.has(letter))) {
    notes.push('True voltages are those of the same currents through pipettes without resistance or capacitance.');
  }
  if (plan.protocol.carryOver) {
    const interval = withUnit(fromSi(prepared.laidOut.sweepInterval, 'ms'), 'ms');
    notes.push(`Sweeps carry over: each starts where the one before has come after ${interval}.`);
  }
  return notes;
}
