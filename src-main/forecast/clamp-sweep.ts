// Clamp error of one sweep: what to measure it against and over what window, and the measure in trade units.
import type { ClampSweep } from '../contract/results.ts';
import { commandBreaks, levelBetween } from '../protocol/command-course.ts';
import type { CommandPiece } from '../protocol/command.ts';
import type { LaidSweep } from '../protocol/sweeps.ts';
import { blockWithin, resolveWindow, type TimeWindow } from '../protocol/window.ts';
import type { PlacedPipette, PreparedPlan } from '../solver/prepare.ts';
import { fromSi, toSi, type Second, type Volt } from '../units/si.ts';
import { clampMeter } from './clamp-error.ts';
import { nearestClamp } from './nearest-clamp.ts';
import { reachByRegion, reachOf } from './reach.ts';

export interface SweepClampMeter {
  readonly onSample: (index: number, V: Float64Array) => void;
  readonly result: () => ClampSweep;
}

type ClampPlan = Pick<PreparedPlan, 'grid' | 'clampWindow' | 'laidOut' | 'plan' | 'pipettes'>;

/** The clamp that errors are told against: the first pipette in voltage clamp. */
export function referenceClamp(prepared: Pick<PreparedPlan, 'pipettes'>): PlacedPipette | undefined {
  return prepared.pipettes.find(({ mode }) => mode === 'voltage clamp');
}

/** What a sweep's clamp error is judged by. */
export interface ClampTarget {
  readonly pipette: PlacedPipette;
  readonly command: readonly CommandPiece[];
  readonly window: TimeWindow;
  /** Start of the block the window begins in. */
  readonly blockStart: Second;
  /** The one level of the window, V; null where there are several. */
  readonly level: Volt | null;
  readonly tolerance: Volt;
}

/**
 * The target of one sweep; null where there is none: no voltage clamp, a window of no length in this sweep, or a
 * tolerance in per cent of a step of zero.
 */
export function clampTarget(prepared: ClampPlan, sweep: LaidSweep): ClampTarget | null {
  const { clampWindow, laidOut, plan } = prepared;
  const pipette = referenceClamp(prepared);
  const lane = sweep.lanes.find((candidate) => candidate.pipette === pipette?.letter);
  if (pipette === undefined || lane === undefined || clampWindow === null) return null;
  const window = resolveWindow(clampWindow, sweep);
  const block = blockWithin(clampWindow, sweep);
  if (window === undefined || block === undefined || !(window.to > window.from)) return null;
  const level = levelBetween(lane.command, window.from, window.to, laidOut.sampling);
  const target = level ?? lastLevel(lane.command, window.to, laidOut.sampling);
  const tolerance = toleranceOf(plan.tolerance, target - lane.holding);
  if (tolerance === null) return null;
  return { pipette, command: lane.command, window, blockStart: block.start, level, tolerance };
}

/** A meter for one sweep; null where `clampTarget` is. */
export function sweepClampMeter(prepared: ClampPlan, sweep: LaidSweep): SweepClampMeter | null {
  const { grid, laidOut } = prepared;
  const target = clampTarget(prepared, sweep);
  if (target === null) return null;
  const { pipette, command, window, blockStart, level, tolerance } = target;
  const meter = clampMeter({
    compartments: grid.count,
    ideal: command,
    breaks: commandBreaks(sweep.lanes.map((lane) => lane.command)),
    sampling: laidOut.sampling,
    samples: sweep.samples,
    window,
    blockStart,
    tolerance,
  });
  const clamps = prepared.pipettes.filter(({ mode }) => mode === 'voltage clamp').map(({ compartment }) => compartment);
  const result = (): ClampSweep => {
    const { steady, worst, settling } = meter.measure();
    const nearest = nearestClamp(grid, clamps);
    return {
      sweep: sweep.index,
      level_mV: level === null ? null : fromSi(level, 'mV'),
      windowStart_ms: fromSi(window.from, 'ms'),
      windowEnd_ms: fromSi(window.to, 'ms'),
      reach: reachOf(grid, steady, tolerance),
      reachByRegion: reachByRegion(grid, steady, tolerance).map(({ region, reach }) => ({ region, reach })),
      steady_mV: steady.map((V) => fromSi(V, 'mV')),
      worst_mV: worst.map((V) => fromSi(V, 'mV')),
      settling_ms: settling.map((s) => fromSi(s, 'ms')),
      accessPart_mV: fromSi(steady[pipette.compartment] ?? NaN, 'mV'),
      access_mV: Float64Array.from(nearest, (clamp) => fromSi(steady[clamps[clamp] ?? -1] ?? NaN, 'mV')),
    };
  };
  return { onSample: meter.onSample, result };
}

/** The tolerance in V; null where it is a share of a step of zero. */
export function toleranceOf(tolerance: PreparedPlan['plan']['tolerance'], step: Volt): Volt | null {
  if (tolerance.unit === 'mV') return toSi(tolerance.value, 'mV');
  return step === 0 ? null : (tolerance.value / 100) * Math.abs(step);
}

// The level just before the window's end, where the command is not one level: a ramp is judged by where it has come.
function lastLevel(command: LaidSweep['lanes'][number]['command'], to: number, sampling: number): Volt {
  return command.findLast((piece) => piece.start < to - 1e-6 * sampling)?.v1 ?? NaN;
}
