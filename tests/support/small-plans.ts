// Plans on sketched cells of two or three compartments: quick to run, and all numbers are ours, round ones.
import { planSchema, type PlanDocument } from '../../src-main/contract/documents.ts';

/** A soma and two pieces of dendrite, passive; a family of three steps in voltage clamp, a reading in each. */
export function smallPlan(changes: Partial<PlanDocument> = {}): PlanDocument {
  const plan = planSchema.parse({
    kind: 'plan',
    format: 1,
    name: 'Three steps',
    note: 'A plan for tests: Zürich, äpfel.',
    cell: {
      kind: 'cell',
      format: 1,
      name: 'Three balls',
      note: 'Made up for tests.',
      surroundings: { temperature_C: 22 },
      channels: [{ name: 'leak', reversal_mV: -68, gates: [] }],
      compartments: ['soma', 'near', 'far'].map((name) => ({
        name,
        area_um2: 1000,
        capacitance_uF_cm2: 1,
        channels: { leak: 0.1 },
      })),
      couplings_nS: [
        ['soma', 'near', 5],
        ['near', 'far', 2],
      ],
    },
    rig: {
      kind: 'rig',
      format: 1,
      name: 'One pipette',
      pipettes: [{ letter: 'A', site: { compartment: 'soma' }, mode: 'voltage clamp', accessResistance_MOhm: 10 }],
    },
    protocol: {
      kind: 'protocol',
      format: 1,
      name: 'Family',
      sampling_us: 50,
      sweepInterval_ms: 100,
      lanes: [
        {
          pipette: 'A',
          unit: 'mV',
          holding: -70,
          blocks: [
            { kind: 'hold', id: 'before', duration_ms: 5 },
            { kind: 'step', id: 'test', duration_ms: 20, level: -60 },
            { kind: 'hold', id: 'after', duration_ms: 5 },
          ],
        },
      ],
      ladders: [{ lane: 'A', block: 'test', number: 'level', rungs: { start: -60, increment: 20, count: 3 } }],
      readings: [
        {
          id: 'end-current',
          name: 'Current at the end',
          pipette: 'A',
          measure: 'mean',
          window: {
            lane: 'A',
            from: { block: 'test', edge: 'end', offset_ms: -5 },
            to: { block: 'test', edge: 'end' },
          },
        },
      ],
    },
    probes: [{ name: 'tip', site: { compartment: 'far' } }],
  });
  return { ...plan, ...changes };
}

/** The same with a test step of `seconds`: long enough to be cancelled or to have its worker die. */
export function longPlan(seconds: number): PlanDocument {
  const plan = smallPlan({ name: 'Long steps' });
  const [lane] = plan.protocol.lanes;
  if (!lane) throw new Error('the small plan has a lane');
  const blocks = lane.blocks.map((block) => (block.id === 'test' ? { ...block, duration_ms: seconds * 1000 } : block));
  const protocol = { ...plan.protocol, sweepInterval_ms: (seconds + 1) * 1000, lanes: [{ ...lane, blocks }] };
  return { ...plan, protocol };
}
