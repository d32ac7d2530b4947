// What the cell's colours stand for. Each area has its own default; the user may choose another.
import type { Tolerance } from '../../src-main/contract/documents.ts';
import type { ClampSweep } from '../../src-main/contract/results.ts';
import { area } from './area.svelte.ts';
import type { Area } from './areas.ts';
import { cursor } from './cursor.svelte.ts';
import { drawing } from './drawing.svelte.ts';
import { estimate } from './estimate.svelte.ts';
import { isSameShape, onGrid } from './on-grid.ts';
import { plan } from './plan.svelte.ts';
import { ranCell } from './ran-cell.svelte.ts';
import { rehearsal } from './rehearsal.svelte.ts';

export const colourings = [
  'nothing',
  'control',
  'steady error',
  'worst error',
  'settling time',
  'membrane voltage',
] as const;
export type ColouringName = (typeof colourings)[number];

export interface Colouring {
  readonly name: ColouringName;
  /** What is shown and when, for the legend: "clamp error at the window's end". */
  readonly label: string;
  readonly unit: string;
  readonly scale: 'magnitude' | 'signed';
  /** One per compartment, grid order; NaN where there is none. */
  readonly values: Float64Array;
  readonly low: number;
  readonly high: number;
  /** Strokes on the colour scale, in the unit. */
  readonly marks: readonly number[];
  /** From the passive estimate, not from a rehearsal. */
  readonly isEstimate: boolean;
}

const defaults: Record<Area, ColouringName> = {
  Cell: 'nothing',
  Rig: 'control',
  Protocol: 'nothing',
  Rehearse: 'membrane voltage',
  Forecast: 'steady error',
};

class ColouringState {
  #chosen = $state<Partial<Record<Area, ColouringName>>>({});
  /** What the open area wants to show. */
  readonly wanted: ColouringName = $derived(this.#chosen[area.open] ?? defaults[area.open]);
  /** What can be shown of it now; null while there is nothing of the plan as it stands. */
  readonly shown: Colouring | null = $derived(colouringOf(this.wanted));

  choose(name: ColouringName): void {
    this.#chosen = { ...this.#chosen, [area.open]: name };
  }
}

function colouringOf(name: ColouringName): Colouring | null {
  const count = drawing.drawing?.compartments.count ?? 0;
  if (name === 'nothing' || count === 0 || !plan.isOpen) return null;
  const found = name === 'control' ? control() : fromForecast(name);
  // After an edit the grid may differ from the one the figures belong to: then they colour nothing.
  return found?.values.length === count ? found : null;
}

function control(): Colouring | null {
  const values = estimate.value?.control;
  if (!values || estimate.of !== plan.document) return null;
  const share = values.map((v) => 100 * v);
  return {
    name: 'control',
    label: 'steady control under A, passive',
    unit: '%',
    scale: 'magnitude',
    values: share,
    low: Math.min(0, Math.floor(least(share) / 10) * 10),
    high: 100,
    marks: [],
    isEstimate: true,
  };
}

function fromForecast(name: Exclude<ColouringName, 'nothing' | 'control'>): Colouring | null {
  const clamp = rehearsal.forecast?.clamp;
  const sweep = clamp?.sweeps.find((s) => s.sweep === cursor.sweep) ?? clamp?.sweeps[clamp.worstSweep];
  const table = drawing.drawing?.compartments;
  const ran = ranCell.drawing?.compartments;
  if (!clamp || sweep === undefined || !table || ran?.count !== sweep.steady_mV.length) return null;
  // An older rehearsal is coloured on the cell as it stands, where that is the same cell.
  if (!rehearsal.isCurrent && !(rehearsal.ran && isSameShape(rehearsal.ran.cell, plan.document.cell))) return null;
  const found = ofSweep(name, sweep, clamp.tolerance);
  return found && { ...found, values: onGrid(found.values, ran, table) };
}

function ofSweep(
  name: Exclude<ColouringName, 'nothing' | 'control'>,
  sweep: ClampSweep,
  tolerance: Tolerance,
): Colouring | null {
  const common = { name, unit: 'mV', marks: [], isEstimate: false };
  switch (name) {
    case 'steady error':
      return { ...common, label: 'clamp error at window end', ...signed(sweep.steady_mV, sweep, tolerance) };
    case 'worst error':
      return { ...common, label: 'largest clamp error in window', ...signed(sweep.worst_mV, sweep, tolerance) };
    case 'settling time': {
      const high = roundUp(largest(sweep.settling_ms));
      return {
        ...common,
        label: 'settling time',
        unit: 'ms',
        scale: 'magnitude',
        values: sweep.settling_ms,
        low: 0,
        high,
      };
    }
    case 'membrane voltage': {
      const level = sweep.level_mV;
      if (level === null) return null;
      const values = sweep.steady_mV.map((error) => level + error);
      const low = Math.floor(least(values) / 10) * 10;
      const high = Math.max(low + 10, Math.ceil(largest(values) / 10) * 10);
      return { ...common, label: 'membrane voltage at window end', scale: 'magnitude', values, low, high };
    }
    default:
      return name satisfies never;
  }
}

function signed(
  values: Float64Array,
  sweep: ClampSweep,
  tolerance: Tolerance,
): Pick<Colouring, 'scale' | 'values' | 'low' | 'high' | 'marks'> {
  const mark = tolerance_mV(tolerance, sweep);
  const high = roundUp(Math.max(largest(values.map(Math.abs)), mark === null ? 0 : 2 * mark));
  return { scale: 'signed', values, low: -high, high, marks: mark === null ? [] : [-mark, mark] };
}

/** The tolerance of one sweep in mV; a share of the step from holding where it is given in per cent. */
function tolerance_mV(tolerance: Tolerance, sweep: ClampSweep): number | null {
  if (tolerance.unit === 'mV') return tolerance.value;
  const holding = (rehearsal.ran ?? plan.document).protocol.lanes.find((lane) => lane.unit === 'mV')?.holding;
  if (holding === undefined || sweep.level_mV === null) return null;
  const step = Math.abs(sweep.level_mV - holding);
  return step === 0 ? null : (tolerance.value / 100) * step;
}

function least(values: Float64Array): number {
  return values.reduce((best, v) => (v < best ? v : best), Infinity);
}
function largest(values: Float64Array): number {
  return values.reduce((best, v) => (v > best ? v : best), -Infinity);
}

/** The next round figure, so that the scale ends on one. */
function roundUp(value: number): number {
  if (!(value > 0) || !Number.isFinite(value)) return 1;
  const decade = 10 ** Math.floor(Math.log10(value));
  return ([1, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10].find((m) => m * decade >= value * (1 - 1e-9)) ?? 10) * decade;
}

export const colouring = new ColouringState();
