// When a sweep must stop: every regular step, and everything that does not fall on one.
import type { CommandPiece } from '../protocol/command.ts';
import type { Second } from '../units/si.ts';

/**
 * A place in time that the steps land on. Counted in regular steps: `grid` whole ones and `rest` of the next, so that
 * nothing drifts with the length of the sweep.
 */
export interface Stop {
  readonly grid: number;
  readonly rest: number;
  readonly time: Second;
  /** A command jumps or bends here. */
  readonly breaks: boolean;
  /** Indices into the extra times. */
  readonly extras: readonly number[];
}

export interface Timeline {
  readonly step: Second;
  readonly sampling: Second;
  /** Regular steps per sampling interval. */
  readonly stepsPerSample: number;
  /** Samples at 0, 1, 2 ... sampling intervals, up to and including the duration. */
  readonly samples: number;
  /** Ascending; the last one is the end of the sweep. */
  readonly stops: readonly Stop[];
}

/** Times closer than this part of a step are the same time: block edges carry rounding, no protocol means 25 ps. */
const same = 1e-6;

/** Time of a regular step: one product and one quotient, whatever the index. */
export function timeOfStep(timeline: Timeline, grid: number): Second {
  return (grid * timeline.sampling) / timeline.stepsPerSample;
}

/**
 * The timeline of a sweep.
 *
 * @throws Error where `step` does not divide `sampling`, or an extra time lies outside the sweep: the caller's bug.
 */
export function timelineOf(input: {
  readonly duration: Second;
  readonly sampling: Second;
  readonly step: Second;
  readonly commands: readonly (readonly CommandPiece[])[];
  readonly extraTimes: Float64Array;
}): Timeline {
  const { duration, sampling, commands, extraTimes } = input;
  const ratio = sampling / input.step;
  const stepsPerSample = Math.round(ratio);
  if (!(stepsPerSample >= 1 && Math.abs(ratio - stepsPerSample) < same)) {
    throw new Error(`step ${input.step} s does not divide the sampling interval ${sampling} s`);
  }
  const step = sampling / stepsPerSample;
  const raw: { time: Second; breaks: boolean; extra: number }[] = [{ time: duration, breaks: false, extra: -1 }];
  for (const pieces of commands) {
    for (const time of breaksOf(pieces, same * step)) {
      if (time > same * step && time < duration - same * step) raw.push({ time, breaks: true, extra: -1 });
    }
  }
  extraTimes.forEach((time, extra) => {
    if (!(time >= 0 && time <= duration + same * step)) throw new Error(`extra time ${time} s is outside the sweep`);
    raw.push({ time, breaks: false, extra });
  });
  raw.sort((a, b) => a.time - b.time);

  const stops: Stop[] = [];
  for (const { time, breaks, extra } of raw) {
    const [grid, rest] = placeOf(time, sampling, stepsPerSample);
    const last = stops.at(-1);
    const extras = extra < 0 ? [] : [extra];
    if (last !== undefined && grid - last.grid + (rest - last.rest) < same) {
      // A break keeps its own time, so that the command's next piece is found there.
      stops[stops.length - 1] = {
        ...last,
        time: breaks ? time : last.time,
        breaks: last.breaks || breaks,
        extras: [...last.extras, ...extras],
      };
    } else {
      stops.push({ grid, rest, time, breaks, extras });
    }
  }
  // Counted by the steps, so that every sample is one that the steps come to.
  const samples = Math.floor((stops.at(-1)?.grid ?? 0) / stepsPerSample) + 1;
  return { step, sampling, stepsPerSample, samples, stops };
}

function placeOf(time: Second, sampling: Second, stepsPerSample: number): [number, number] {
  const steps = (time / sampling) * stepsPerSample;
  const nearest = Math.round(steps);
  if (Math.abs(steps - nearest) < same) return [nearest, 0];
  const grid = Math.floor(steps);
  return [grid, steps - grid];
}

/** Where a command jumps or changes its slope; empty pieces are passed over. */
function breaksOf(pieces: readonly CommandPiece[], shortest: Second): Second[] {
  const times: Second[] = [];
  let last: CommandPiece | undefined;
  for (const piece of pieces) {
    if (piece.end - piece.start <= shortest) continue;
    if (last !== undefined && (last.v1 !== piece.v0 || slopeOf(last) !== slopeOf(piece))) times.push(piece.start);
    last = piece;
  }
  return times;
}

/** Slope of a piece, per second. */
export function slopeOf(piece: CommandPiece): number {
  return piece.v1 === piece.v0 ? 0 : (piece.v1 - piece.v0) / (piece.end - piece.start);
}
