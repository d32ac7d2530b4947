// From rehearsed sweeps to the forecast of the plan.
import type { ClampForecast, ClampSweep, Forecast, PipetteForecast, ReadingForecast } from '../contract/results.ts';
import { readingUnit } from '../protocol/readings/take.ts';
import { clampBandwidth } from '../rig/pipette.ts';
import type { PreparedPlan } from '../solver/prepare.ts';
import { fromSi, toSi, type Volt } from '../units/si.ts';
import { dualSiteOf } from './attenuation.ts';
import { firingCautions } from './cautions.ts';
import { clampTarget, referenceClamp } from './clamp-sweep.ts';
import { forecastNotes } from './notes.ts';
import { reachByRegion, trustDistance } from './reach.ts';
import type { RehearsedSweep, SweepRehearsal } from './sweep-rehearsal.ts';

/**
 * The forecast of a plan from its rehearsed sweeps, in any order; sweeps that were cancelled or stopped are left out.
 * Numerical uncertainty is pending: it needs a second, finer forecast.
 */
export function gatherForecast(prepared: PreparedPlan, sweeps: readonly SweepRehearsal[]): Forecast {
  const done = sweeps.filter((sweep) => sweep.kind === 'done').toSorted((a, b) => a.sweep - b.sweep);
  const clamp = clampForecast(prepared, done);
  const dual = dualSiteOf(prepared);
  return {
    clamp,
    dualSite: dual.figures,
    readings: readingForecasts(prepared, done),
    pipettes: pipetteForecasts(prepared, done),
    cautions: firingCautions(prepared.grid, clamp?.sweeps ?? []),
    notes: [...forecastNotes(prepared, done), ...dual.notes],
    numerical: { state: 'pending', clampError_mV: null, reach: null },
  };
}

function clampForecast(prepared: PreparedPlan, done: readonly RehearsedSweep[]): ClampForecast | null {
  const pipette = referenceClamp(prepared);
  const sweeps = done.flatMap(({ clamp }) => (clamp === null ? [] : [clamp]));
  const [first, ...others] = sweeps;
  if (pipette === undefined || first === undefined) return null;
  const worst = others.reduce((a, b) => (isWorse(b, a) ? b : a), first);
  const { grid, plan } = prepared;
  const trust = sweeps.flatMap((sweep) => trustDistance(grid, inVolts(sweep), toleranceIn(prepared, sweep)) ?? []);
  const parts = sweeps.map(({ accessPart_mV }) => accessPart_mV);
  return {
    pipette: pipette.letter,
    tolerance: plan.tolerance,
    sweeps,
    reach: worst.reach,
    reachByRegion: reachByRegion(grid, inVolts(worst), toleranceIn(prepared, worst)).map(({ region, area, reach }) => ({
      region,
      area_um2: fromSi(area, 'um2'),
      reach,
    })),
    worstSweep: worst.sweep,
    trustDistance_um: trust.length === 0 ? null : fromSi(Math.min(...trust), 'um'),
    accessError_mV: parts.reduce((far, part) => (Math.abs(part) > Math.abs(far) ? part : far), 0),
  };
}

/** Less reach; of sweeps with the same reach, often none at all, the one with the larger error. */
function isWorse(a: ClampSweep, b: ClampSweep): boolean {
  return a.reach === b.reach ? largestError(a) > largestError(b) : a.reach < b.reach;
}

function largestError({ steady_mV }: ClampSweep): number {
  return steady_mV.reduce((most, error) => Math.max(most, Math.abs(error)), 0);
}

function inVolts({ steady_mV }: ClampSweep): Float64Array {
  return steady_mV.map((mV) => toSi(mV, 'mV'));
}

function toleranceIn(prepared: PreparedPlan, { sweep }: ClampSweep): Volt {
  return clampTarget(prepared, prepared.laidOut.sweep(sweep))?.tolerance ?? NaN;
}

function readingForecasts(prepared: PreparedPlan, done: readonly RehearsedSweep[]): ReadingForecast[] {
  const { laidOut, pipettes, plan } = prepared;
  return plan.protocol.readings.map((reading, r) => {
    const mode = pipettes.find(({ letter }) => letter === reading.pipette)?.mode ?? 'voltage clamp';
    const recorded = new Float64Array(laidOut.count).fill(NaN);
    const truth = new Float64Array(laidOut.count).fill(NaN);
    let known = false;
    for (const { sweep, readings } of done) {
      recorded[sweep] = readings[r]?.recorded ?? NaN;
      truth[sweep] = readings[r]?.truth ?? NaN;
      known ||= typeof readings[r]?.truth === 'number';
    }
    const ladderValue = Float64Array.from({ length: laidOut.count }, (_, sweep) => laidOut.sweep(sweep).ladderValue);
    const unit = readingUnit(reading.measure, mode);
    return { reading: reading.id, name: reading.name, unit, recorded, truth: known ? truth : null, ladderValue };
  });
}

function pipetteForecasts(prepared: PreparedPlan, done: readonly RehearsedSweep[]): PipetteForecast[] {
  const capacitance = prepared.grid.capacitance.reduce((sum, C) => sum + C, 0);
  return prepared.pipettes.map((pipette, p) => ({
    letter: pipette.letter,
    site: pipette.site,
    clampBandwidth_Hz: pipette.mode === 'voltage clamp' ? clampBandwidth(pipette.access, capacitance) : null,
    largestCurrent_pA: done
      .map((sweep) => sweep.largestCurrent_pA[p] ?? 0)
      .reduce((far, I) => (Math.abs(I) > Math.abs(far) ? I : far), 0),
  }));
}
