import type { Second } from '../units/si.ts';
import { turnPieces } from './electrodes.ts';
import { gateStates } from './membrane.ts';
import { keep, keptRoom, recorderOf } from './recorder.ts';
import type { SweepInput, SweepResult } from './run.ts';
import { bringGatesUp, dampedStep, impose, plainStep } from './step.ts';
import { timelineOf, timeOfStep } from './timeline.ts';
import { workspaceOf, type Workspace } from './workspace.ts';

/**
 * Regular steps after a break that are damped. What decays within half a step, and would ring, is down to e^-12 by then
 * (measured: tests/analytic/clamp-steps).
 */
const dampedSteps = 6;
/** Compartment-steps between two looks at `cancelled`: a few milliseconds. */
const workBetweenPolls = 100_000;

/**
 * One sweep of a cell under its pipettes.
 *
 * Gates and voltages are staggered by half a step: gates go exactly exponentially at the voltage in between, voltages by
 * Crank–Nicolson as a backward half step and an extrapolation. A gate that follows the voltage at once is taken to the
 * middle of the step along its last two values. After every jump or bend of a command, and at the start,
 * the first few steps are damped, so that fast modes die out instead of ringing. Second order in the step. The same input
 * gives the same bits.
 *
 * Regular samples lie at 0, 1, 2 … sampling intervals up to and including the duration. At a jump a sample has what
 * holds from there on. The charge that a jump puts on a capacitance at once has no width and is in no sample.
 *
 * @throws Refusal `quantity-out-of-range` for two ideal voltage clamps in one compartment.
 * @throws Error where the step does not divide the sampling interval.
 * @source Staggering: Hines M (1984), Int J Biomed Comput 15:69–76. Damping: Rannacher R (1984), Numer Math 43:309–327.
 *         Both from memory.
 */
export function runSweep(input: SweepInput): SweepResult {
  const { grid } = input;
  const extraTimes = input.extraTimes ?? new Float64Array(0);
  const timeline = timelineOf({ ...input, commands: input.pipettes.map(({ command }) => command), extraTimes });
  const { step, stepsPerSample, stops } = timeline;
  const slack = 1e-6 * step;
  const work = workspaceOf(input, step);
  const { V, membrane, electrodes } = work;
  const recorder = recorderOf(input, membrane, electrodes, work.capacitance);
  const regular = keptRoom(recorder, timeline.samples);
  const extra = input.extraTimes === undefined ? null : keptRoom(recorder, extraTimes.length);
  const stepsBetweenPolls = Math.max(1, Math.floor(workBetweenPolls / grid.count));

  // Place in time: regular steps done, and the part of the next one.
  let done = 0;
  let rest = 0;
  let time: Second = 0;
  let next = 0;
  // The step before, half of which the gates are behind; 0 after a break, where they are brought up to date.
  let before: Second = 0;
  let lastBreak = 0;
  let countdown = stepsBetweenPolls;

  turnPieces(electrodes, 0, slack);
  impose(electrodes, V, 0);
  for (;;) {
    const stop = stops[next]!;
    const atStop = stop.grid === done && stop.rest === rest;
    if (atStop) {
      time = stop.time;
      if (stop.breaks) {
        bringGatesUp(work, before / 2);
        before = 0;
        turnPieces(electrodes, time, slack);
        impose(electrodes, V, time);
        lastBreak = done + rest;
      }
    }
    const now = { time, V, ahead: before / 2 };
    if (rest === 0 && done % stepsPerSample === 0) {
      const index = done / stepsPerSample;
      if (index < timeline.samples) {
        keep(recorder, regular, index, now);
        input.onSample?.(index, V);
      }
    }
    if (atStop) {
      if (extra !== null) for (const index of stop.extras) keep(recorder, extra, index, now);
      next++;
      if (next === stops.length) break;
    }

    if (--countdown === 0) {
      countdown = stepsBetweenPolls;
      if (input.cancelled?.() === true) return { kind: 'cancelled' };
    }

    const ahead = stops[next]!;
    const whole = rest === 0 && (ahead.grid > done || (ahead.grid === done && ahead.rest === 0));
    const toStop = ahead.grid === done && ahead.rest > rest;
    const h = whole ? step : ((toStop ? ahead.rest : 1) - rest) * step;
    const sinceBreak = done + rest - lastBreak;
    if (toStop) {
      rest = ahead.rest;
    } else {
      done++;
      rest = 0;
    }
    const end = toStop ? ahead.time : timeOfStep(timeline, done);
    const lead = before === 0 ? 0 : h / (2 * before);
    const at = { time, h, end, advance: before === h ? h : (before + h) / 2, lead };
    const finite =
      sinceBreak < dampedSteps - 1e-9 ? dampedStep(work, at, sinceBreak * step, step) : plainStep(work, at);
    if (!finite) {
      return { kind: 'diverged', time: end, compartment: whereItBroke(work) };
    }
    time = end;
    before = h;
  }
  bringGatesUp(work, before / 2);
  return {
    kind: 'done',
    ...regular,
    extra,
    end: {
      V: V.slice(),
      gates: gateStates(membrane, grid.count),
      pipetteV: Float64Array.from(electrodes, (electrode) =>
        electrode.way === 'behind a node' ? electrode.nodeV : V[electrode.compartment]!,
      ),
    },
  };
}

/** The compartment whose own gate or command is not finite; the solve has spread the fault to all others. */
function whereItBroke(work: Workspace): number {
  for (const channel of work.membrane.channels) {
    for (const state of channel.states) {
      const i = state.findIndex((x) => !Number.isFinite(x));
      if (i >= 0) return channel.at[i]!;
    }
  }
  return work.electrodes[0]?.compartment ?? 0;
}
