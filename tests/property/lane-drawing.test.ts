// The window draws a protocol from its documents, the engine plays it: both must be the same course.
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { protocolSchema, type ProtocolDocument } from '../../src-main/contract/documents.ts';
import { layOut } from '../../src-main/protocol/sweeps.ts';
import { resolveWindow } from '../../src-main/protocol/window.ts';
import { drawSweep, windowSpan, type DrawnLane } from '../../src-renderer/protocol/lane-drawing.ts';
import { sweepCount } from '../../src-renderer/protocol/ladder-rungs.ts';

const level = fc.integer({ min: -1500, max: 1500 }).map((n) => n / 10);
const duration = fc.integer({ min: 1, max: 4000 }).map((n) => n / 40);
const block = (id: string): fc.Arbitrary<unknown> =>
  fc.oneof(
    fc.record({ kind: fc.constant('hold'), id: fc.constant(id), duration_ms: duration }),
    fc.record({ kind: fc.constant('step'), id: fc.constant(id), duration_ms: duration, level }),
    fc.record({ kind: fc.constant('ramp'), id: fc.constant(id), duration_ms: duration, from: level, to: level }),
    fc.record({
      kind: fc.constant('pulse train'),
      id: fc.constant(id),
      duration_ms: fc.integer({ min: 120, max: 200 }),
      level,
      base: level,
      width_ms: fc.integer({ min: 1, max: 9 }),
      rate_Hz: fc.constantFrom(50, 70, 100),
      count: fc.integer({ min: 1, max: 6 }),
    }),
  );
const lane = (pipette: string, unit: string, ids: string[]): fc.Arbitrary<unknown> =>
  fc.record({
    pipette: fc.constant(pipette),
    unit: fc.constant(unit),
    holding: level,
    blocks: fc.tuple(...ids.map(block)),
  });
const protocols = fc
  .record({
    lanes: fc.tuple(lane('A', 'mV', ['a1', 'a2', 'a3']), lane('B', 'pA', ['b1', 'b2'])),
    rungs: fc.oneof(
      fc.record({ start: duration, increment: fc.constantFrom(0.1, 2.5), count: fc.integer({ min: 1, max: 5 }) }),
      fc.record({ list: fc.array(duration, { minLength: 1, maxLength: 5 }) }),
    ),
    repeats: fc.integer({ min: 1, max: 2 }),
  })
  .map(({ lanes, rungs, repeats }) => {
    const hasRoom = (lanes[0] as { blocks: { kind: string }[] }).blocks[1]?.kind !== 'pulse train';
    return protocolSchema.parse({
      kind: 'protocol',
      format: 1,
      name: 'drawn',
      sampling_us: 25,
      sweepInterval_ms: 100_000,
      repeats,
      lanes,
      ladders: hasRoom ? [{ lane: 'A', block: 'a2', number: 'duration_ms', rungs }] : [],
      readings: [
        {
          id: 'late',
          name: 'late',
          pipette: 'A',
          measure: 'mean',
          window: {
            lane: 'A',
            from: { block: 'a3', edge: 'start', offset_ms: 0 },
            to: { block: 'a3', edge: 'end', offset_ms: 0 },
          },
        },
      ],
    });
  });

/** The drawn level just after a time, in the lane's unit. */
function drawnAfter(drawn: DrawnLane, ms: number): number {
  for (let i = drawn.time_ms.length - 2; i >= 0; i -= 1) {
    const t0 = drawn.time_ms[i] ?? NaN;
    const t1 = drawn.time_ms[i + 1] ?? NaN;
    if (t1 <= t0 || ms < t0 || ms >= t1) continue;
    const v0 = drawn.level[i] ?? NaN;
    return v0 + ((ms - t0) / (t1 - t0)) * ((drawn.level[i + 1] ?? NaN) - v0);
  }
  return NaN;
}

function compare(protocol: ProtocolDocument): void {
  const laid = layOut(protocol);
  expect(sweepCount(protocol)).toBe(laid.count);
  for (let sweep = 0; sweep < laid.count; sweep += 1) {
    const drawn = drawSweep(protocol, sweep);
    const played = laid.sweep(sweep);
    // Both count in whole picoseconds; only the division into ms or s rounds.
    expect(drawn.duration_ms).toBeCloseTo(played.duration * 1e3, 9);
    played.lanes.forEach((lane, l) => {
      const scale = lane.unit === 'mV' ? 1e-3 : 1e-12;
      for (const piece of lane.command) {
        for (const share of [0.25, 0.75]) {
          const at = piece.start + share * (piece.end - piece.start);
          const value = (piece.v0 + share * (piece.v1 - piece.v0)) / scale;
          const line = drawn.lanes[l];
          expect(line && drawnAfter(line, at * 1e3)).toBeCloseTo(value, 6);
        }
      }
    });
    const window = protocol.readings[0]?.window;
    const span = window && windowSpan(window, drawn);
    const played_s = window && resolveWindow(window, played);
    expect(span?.from_ms).toBeCloseTo((played_s?.from ?? NaN) * 1e3, 9);
    expect(span?.to_ms).toBeCloseTo((played_s?.to ?? NaN) * 1e3, 9);
  }
}

describe('lanes as drawn', () => {
  it('have the level, the length and the windows the engine plays, in every sweep', () => {
    fc.assert(fc.property(protocols, compare), { numRuns: 150, seed: 20260611 });
  });

  it('a lane that ends early is held at its holding level to the end of the longest', () => {
    const protocol = protocolSchema.parse({
      kind: 'protocol',
      format: 1,
      name: 'short and long',
      sampling_us: 50,
      sweepInterval_ms: 1000,
      lanes: [
        { pipette: 'A', unit: 'mV', holding: -70, blocks: [{ kind: 'step', id: 'a', duration_ms: 10, level: 0 }] },
        { pipette: 'B', unit: 'pA', holding: 5, blocks: [{ kind: 'hold', id: 'b', duration_ms: 40 }] },
      ],
    });
    const lane = drawSweep(protocol, 0).lanes[0];
    expect(lane?.time_ms).toEqual([0, 10, 10, 40]);
    expect(lane?.level).toEqual([0, 0, -70, -70]);
  });
});
