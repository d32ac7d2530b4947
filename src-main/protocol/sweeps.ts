import type { ProtocolDocument } from '../contract/documents.ts';
import type { Second } from '../units/si.ts';
import { refuseFaults } from './check.ts';
import { layLane, longestLane, rungBlocks, type LaidLane } from './lane.ts';
import { rungOfSweep, rungsOf, rungValue } from './ladder.ts';
import { sampleCount } from './sampling.ts';
import { secondsOf, ticksOfMs, ticksOfUs, type Tick } from './ticks.ts';

/** One sweep, ready to be played: times in s from its start, levels in V or A. */
export interface LaidSweep {
  readonly index: number;
  readonly duration: Second;
  readonly durationTicks: Tick;
  /** Regular samples: 0, h, 2h ... up to the duration. */
  readonly samples: number;
  readonly lanes: readonly LaidLane[];
  /** What each ladder set, in the ladder's own unit and order. */
  readonly ladderValues: readonly number[];
  /** The first ladder's; NaN without a ladder. */
  readonly ladderValue: number;
}

export interface LaidOut {
  readonly count: number;
  readonly sampling: Second;
  readonly samplingTicks: Tick;
  readonly longest: Second;
  readonly samplesInAll: number;
  /** From the first sweep's start to the last one's end. */
  readonly totalTime: Second;
  /** Start to start. */
  readonly sweepInterval: Second;
  /** Laid out when asked for: a family of many long trains would not fit in memory at once. */
  readonly sweep: (index: number) => LaidSweep;
}

/**
 * Lays a protocol out in time: every sweep's blocks with their ladders applied, commands and edges. All lanes are held
 * at their holding levels to the end of the longest.
 *
 * @throws Refusal with every fault: `protocol-empty`, `too-large`, `name-unknown`, `name-twice`,
 *         `quantity-out-of-range`, `window-outside-sweep`.
 */
export function layOut(protocol: ProtocolDocument): LaidOut {
  refuseFaults(protocol);
  const rungs = Array.from({ length: rungsOf(protocol) }, (_, rung) => longestLane(rungBlocks(protocol, rung)));
  const count = rungs.length * protocol.repeats;
  const samplingTicks = ticksOfUs(protocol.sampling_us);
  const samples = rungs.map((duration) => sampleCount(duration, samplingTicks));
  const interval = ticksOfMs(protocol.sweepInterval_ms);
  return {
    count,
    sampling: secondsOf(samplingTicks),
    samplingTicks,
    longest: secondsOf(rungs.reduce((a, b) => Math.max(a, b), 0)),
    samplesInAll: samples.reduce((sum, n) => sum + n, 0) * protocol.repeats,
    totalTime: secondsOf((count - 1) * interval + (rungs.at(-1) ?? 0)),
    sweepInterval: secondsOf(interval),
    sweep: (index) => laySweep(protocol, index),
  };
}

function laySweep(protocol: ProtocolDocument, index: number): LaidSweep {
  const rung = rungOfSweep(protocol, index);
  const blocks = rungBlocks(protocol, rung);
  const end = longestLane(blocks);
  const ladderValues = protocol.ladders.map((ladder) => rungValue(ladder, rung));
  return {
    index,
    duration: secondsOf(end),
    durationTicks: end,
    samples: sampleCount(end, ticksOfUs(protocol.sampling_us)),
    lanes: protocol.lanes.map((lane, l) => layLane(lane, blocks[l] ?? [], end)),
    ladderValues,
    ladderValue: ladderValues[0] ?? NaN,
  };
}
