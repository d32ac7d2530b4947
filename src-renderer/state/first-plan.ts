// New plans, and plans moved to another cell. Pure.
import type { CellDocument, PlanDocument, Site } from '../../src-main/contract/documents.ts';

/** The place on a cell where a first pipette goes. */
function rootSite(cell: CellDocument): Site {
  const first = 'compartments' in cell ? cell.compartments[0]?.name : undefined;
  return first === undefined ? { branch: 0, at_um: 0 } : { compartment: first };
}

/** The plan on another cell. Sites on the old one mean nothing there: pipettes go to the root, probes are dropped. */
export function onCell(document: PlanDocument, cell: CellDocument): PlanDocument {
  const pipettes = document.rig.pipettes.map((p) => ({ ...p, site: rootSite(cell) }));
  const { initial, ...rest } = document;
  // One number holds for any cell; one per compartment belongs to the old grid.
  const keepsInitial = initial !== undefined && typeof initial.voltage_mV === 'number';
  return {
    ...rest,
    ...(keepsInitial ? { initial } : {}),
    cell,
    rig: { ...document.rig, pipettes },
    probes: [],
  };
}

/** Whether any membrane of the cell has gates; without them a step's early peak is its charging. */
function hasChannels(cell: CellDocument): boolean {
  const used =
    'compartments' in cell
      ? cell.compartments.flatMap((c) => Object.keys(c.channels))
      : cell.makeUp.flatMap((m) => m.channels.map((c) => c.channel));
  const leaks = new Set(cell.channels.filter((c) => c.gates.length === 0).map((c) => c.name));
  return used.some((name) => !leaks.has(name));
}

/**
 * Where a new plan starts: one pipette at the soma, 12 MΩ, a family of steps from −100 to +40 mV, the peak asked for;
 * of a passive cell the steady current, late in the step. Values: common practice for whole-cell recording.
 */
export function firstPlan(cell: CellDocument): PlanDocument {
  const edge = (block: string, side: 'start' | 'end'): { block: string; edge: 'start' | 'end'; offset_ms: number } => ({
    block,
    edge: side,
    offset_ms: 0,
  });
  return {
    kind: 'plan',
    format: 1,
    name: `Steps on ${cell.name}`.slice(0, 200),
    note: '',
    question: { reading: hasChannels(cell) ? 'peak' : 'steady', bias_percent: 5 },
    tolerance: { unit: 'mV', value: 5 },
    probes: [],
    cell,
    rig: {
      kind: 'rig',
      format: 1,
      name: 'One pipette',
      note: '',
      pipettes: [
        {
          letter: 'A',
          site: rootSite(cell),
          mode: 'voltage clamp',
          accessResistance_MOhm: 12,
          strayCapacitance_pF: 0,
          bridge_MOhm: 0,
        },
      ],
    },
    protocol: {
      kind: 'protocol',
      format: 1,
      name: 'Step family',
      note: '',
      sampling_us: 20,
      sweepInterval_ms: 1000,
      repeats: 1,
      carryOver: false,
      lanes: [
        {
          pipette: 'A',
          unit: 'mV',
          holding: -70,
          blocks: [
            { kind: 'hold', id: 'before', duration_ms: 10 },
            { kind: 'step', id: 'step', duration_ms: 40, level: 0 },
            { kind: 'hold', id: 'after', duration_ms: 10 },
          ],
        },
      ],
      ladders: [{ lane: 'A', block: 'step', number: 'level', rungs: { start: -100, increment: 10, count: 15 } }],
      readings: [
        {
          id: 'peak',
          name: 'Peak current',
          pipette: 'A',
          measure: 'peak',
          direction: 'largest',
          window: { lane: 'A', from: { ...edge('step', 'start'), offset_ms: 0.5 }, to: edge('step', 'end') },
          baseline: { lane: 'A', from: edge('before', 'start'), to: edge('before', 'end') },
        },
        {
          id: 'steady',
          name: 'Steady current',
          pipette: 'A',
          measure: 'mean',
          direction: 'largest',
          window: { lane: 'A', from: { ...edge('step', 'end'), offset_ms: -5 }, to: edge('step', 'end') },
          baseline: { lane: 'A', from: edge('before', 'start'), to: edge('before', 'end') },
        },
      ],
    },
  };
}
