import type { Forecast, Trace } from '../../src-main/contract/results.ts';
import type { FinishedRehearsal } from '../../src-main/notebook/rehearsals.ts';
import { writtenPlan } from '../../src-main/engine/written.ts';
import { smallPlan } from './small-plans.ts';

const forecast: Forecast = {
  clamp: null,
  dualSite: null,
  readings: [
    {
      reading: 'end-current',
      name: 'Current at the end',
      unit: 'pA',
      recorded: Float64Array.of(1, NaN, -0),
      truth: null,
      ladderValue: Float64Array.of(0.1, Infinity, 1e-300),
    },
  ],
  pipettes: [],
  cautions: [],
  notes: ['made up for a test'],
  numerical: { state: 'pending', clampError_mV: null, reach: null },
};

/** A rehearsal as the engine would store it, its numbers made up; `samples` in each of its two traces. */
export function finishedRehearsal(planId: number, samples: number): FinishedRehearsal {
  const trace = (key: string): Trace => ({
    sweep: 0,
    key,
    unit: 'pA',
    start_ms: 0,
    interval_ms: 0.05,
    values: Float64Array.from({ length: samples }, (_, i) => Math.sin(i) / 3),
  });
  return {
    planId,
    sessionId: null,
    ...writtenPlan(smallPlan()),
    engineVersion: 'test',
    step_us: 25,
    compartments: 3,
    sweeps: 1,
    wall_s: 0.5,
    forecast,
    traces: [trace('recording:A'), trace('command:A')],
  };
}
