// Puts a stored cell into the open plan.
import type { CellDocument, PlanDocument, Site } from '../../src-main/contract/documents.ts';
import { askOrSay } from './ask.ts';
import { notices } from './notices.svelte.ts';
import { plan } from './plan.svelte.ts';

/** The plan on another cell. Sites on the old one mean nothing there: pipettes go to the root, probes are dropped. */
export function onCell(document: PlanDocument, cell: CellDocument): PlanDocument {
  const first = 'compartments' in cell ? cell.compartments[0]?.name : undefined;
  const root: Site = first === undefined ? { branch: 0, at_um: 0 } : { compartment: first };
  const pipettes = document.rig.pipettes.map((p) => ({ ...p, site: root }));
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
  if (read === null) return;
  plan.change(`cell ${plan.document.cell.name} → ${read.cell.name}`, (p) => onCell(p, read.cell));
  notices.say(`The plan is on “${read.cell.name}” now; pipettes are at its soma`, () => plan.undo());
}
