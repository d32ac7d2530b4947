import type { Segment } from '../segment.ts';
import { ticksOfEvent, ticksOfMs, type Tick } from '../ticks.ts';

export interface PulseTrain {
  readonly duration_ms: number;
  readonly level: number;
  readonly base: number;
  readonly width_ms: number;
  readonly rate_Hz: number;
  readonly count: number;
}

/**
 * Pulse k of `count` lasts from k/rate to k/rate + width after the block's start; the base level fills the rest of the
 * block. Each onset is computed from its own index, so the last pulse is as exact as the first.
 */
export function pulseTrainSegments(train: PulseTrain): Segment[] {
  const end = ticksOfMs(train.duration_ms);
  const width = ticksOfMs(train.width_ms);
  const segments: Segment[] = [];
  let at: Tick = 0;
  const level = (until: Tick, v: number): void => {
    if (until <= at) return;
    segments.push({ start: at, end: until, v0: v, v1: v });
    at = until;
  };
  for (let k = 0; k < train.count; k += 1) {
    const onset = ticksOfEvent(k, train.rate_Hz);
    level(onset, train.base);
    level(Math.min(onset + width, end), train.level);
  }
  level(end, train.base);
  return segments;
}

/** Ticks from the block's start to the end of the last pulse. */
export function pulseTrainLength(train: Pick<PulseTrain, 'width_ms' | 'rate_Hz' | 'count'>): Tick {
  return ticksOfEvent(train.count - 1, train.rate_Hz) + ticksOfMs(train.width_ms);
}

/** Whether a pulse would start before the one before it has ended. A single pulse never does. */
export function pulsesOverlap(train: Pick<PulseTrain, 'width_ms' | 'rate_Hz' | 'count'>): boolean {
  return train.count > 1 && ticksOfMs(train.width_ms) > ticksOfEvent(1, train.rate_Hz);
}
