// Puts cells into plans: a stored one, an imported one, one just made.
import type { CellDocument, PlanDocument, Site } from '../../src-main/contract/documents.ts';
import { askOrSay } from './ask.ts';
import { notebook } from './notebook.svelte.ts';
import { notices } from './notices.svelte.ts';
import { plan } from './plan.svelte.ts';

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

export async function useCell(cellId: number): Promise<void> {
  const read = await askOrSay('cell read', { cellId });
  if (read !== null) changeCell(read.cell);
}

/** Keeps a new cell in the notebook and puts it into the open plan. */
export async function putIntoPlan(cell: CellDocument): Promise<void> {
  if ((await notebook.keepCell(cell)) !== null) changeCell(cell);
}

function changeCell(cell: CellDocument): void {
  plan.change(`cell ${plan.document.cell.name} → ${cell.name}`, (p) => onCell(p, cell));
  notices.say(`The plan is on “${cell.name}” now; pipettes are at its soma`, () => plan.undo());
}

/** Keeps a new cell and opens a plan on it. */
export async function startPlanOn(cell: CellDocument): Promise<void> {
  const cellId = await notebook.keepCell(cell);
  if (cellId !== null) await notebook.createPlan(firstPlan(cell), cellId);
}

/** Opens a new plan on a stored cell. */
export async function startPlanOnStored(cellId: number): Promise<void> {
  const read = await askOrSay('cell read', { cellId });
  if (read !== null) await notebook.createPlan(firstPlan(read.cell), cellId);
}

/**
 * Where a new plan starts: one pipette at the soma, 12 MΩ, a family of steps from −100 to +40 mV, the peak asked for.
 * Values: common practice for whole-cell recording.
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
    question: { reading: 'peak', bias_percent: 5 },
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
