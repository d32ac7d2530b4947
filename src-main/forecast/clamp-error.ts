// How far the membrane is from where the clamp wants it, while a sweep runs.
import { commandReader, isBreak } from '../protocol/command-course.ts';
import type { CommandPiece } from '../protocol/command.ts';
import type { TimeWindow } from '../protocol/window.ts';
import type { Second, Volt } from '../units/si.ts';

export interface ClampMeterInput {
  readonly compartments: number;
  /** V_ideal: the command of the clamp that errors are told against, imposed on all membrane at once. */
  readonly ideal: readonly CommandPiece[];
  /** Times at which any command jumps. */
  readonly breaks: readonly Second[];
  readonly sampling: Second;
  readonly samples: number;
  readonly window: TimeWindow;
  /** Start of the block that settling is counted from. */
  readonly blockStart: Second;
  readonly tolerance: Volt;
}

/** One entry per compartment, grid order. */
export interface ClampMeasure {
  /** V − V_ideal at the window's end, V. */
  readonly steady: Float64Array;
  /** The largest |V − V_ideal| in the window, with its sign, V. */
  readonly worst: Float64Array;
  /** s from the block's start to the last time |error| exceeds the tolerance; 0: never; NaN: still at the window's end. */
  readonly settling: Float64Array;
}

export interface ClampMeter {
  /** To be called for every regular sample in order. */
  readonly onSample: (index: number, V: Float64Array) => void;
  readonly measure: () => ClampMeasure;
}

/**
 * A meter of clamp error: V(x, t) − V_ideal(t) at every sample of a window, in memory that does not grow with time.
 *
 * The window's end is its last sample; where a command jumps there, the sample before it, since the one on the jump
 * already belongs to the next level. Crossings of the tolerance are interpolated between samples.
 */
export function clampMeter(input: ClampMeterInput): ClampMeter {
  const { compartments: n, sampling, window, tolerance } = input;
  const first = firstSampleFrom(Math.min(window.from, input.blockStart), sampling);
  const last = lastSampleOf(input);
  const inWindow = Math.min(firstSampleFrom(window.from, sampling), last);
  const settles = firstSampleFrom(input.blockStart, sampling);
  const idealAt = commandReader(input.ideal, sampling);
  const error = new Float64Array(n);
  const worst = new Float64Array(n);
  const settling = new Float64Array(n);

  const onSample = (index: number, V: Float64Array): void => {
    if (index < first || index > last) return;
    const ideal = idealAt(index * sampling);
    for (let k = 0; k < n; k += 1) {
      const now = (V[k] ?? NaN) - ideal;
      const before = error[k] ?? NaN;
      if (index > settles && Math.abs(before) > tolerance && Math.abs(now) <= tolerance) {
        const edge = before > 0 ? tolerance : -tolerance;
        settling[k] = (index - 1 + (before - edge) / (before - now)) * sampling - input.blockStart;
      }
      if (index >= inWindow && Math.abs(now) >= Math.abs(worst[k] ?? NaN)) worst[k] = now;
      error[k] = now;
    }
  };
  const measure = (): ClampMeasure => ({
    steady: error.slice(),
    worst: worst.slice(),
    settling: settling.map((time, k) => (Math.abs(error[k] ?? NaN) <= tolerance ? time : NaN)),
  });
  return { onSample, measure };
}

function firstSampleFrom(time: Second, sampling: Second): number {
  return Math.max(0, Math.ceil(time / sampling - 1e-6));
}

function lastSampleOf({ window, sampling, samples, breaks }: ClampMeterInput): number {
  const at = Math.floor(window.to / sampling + 1e-6);
  const onJump = Math.abs(window.to / sampling - at) <= 1e-6 && isBreak(breaks, window.to, sampling);
  return Math.max(0, Math.min(onJump ? at - 1 : at, samples - 1));
}
