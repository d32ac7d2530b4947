// What an area shows in its details when it is opened with nothing of its own selected: the thing most often looked at.
import type { PlanDocument } from '../../src-main/contract/documents.ts';
import type { Area } from './areas.ts';
import type { Selection } from './selection.svelte.ts';

const atHome: Readonly<Record<Area, readonly Selection['kind'][]>> = {
  Cell: ['region', 'compartment', 'probe'],
  Rig: ['pipette', 'compartment', 'probe'],
  Protocol: ['lane', 'block', 'reading'],
  Rehearse: ['sweep', 'compartment', 'probe', 'reading'],
  Forecast: ['sweep', 'compartment', 'probe', 'reading', 'region'],
};

/** The selection to go on with in an area: the present one where the area works on its kind, else the area's first thing. */
export function selectionAtHome(area: Area, present: Selection, plan: PlanDocument, sweep: number): Selection {
  if (atHome[area].includes(present.kind)) return present;
  switch (area) {
    case 'Cell': {
      const [region] = 'regions' in plan.cell ? plan.cell.regions : [];
      return region === undefined ? { kind: 'nothing' } : { kind: 'region', region: region.name };
    }
    case 'Rig': {
      const [pipette] = plan.rig.pipettes;
      return pipette === undefined ? { kind: 'nothing' } : { kind: 'pipette', letter: pipette.letter };
    }
    case 'Protocol': {
      const [ladder] = plan.protocol.ladders;
      if (ladder !== undefined) return { kind: 'block', lane: ladder.lane, block: ladder.block };
      const [lane] = plan.protocol.lanes;
      const block = lane?.blocks.find(({ kind }) => kind !== 'hold') ?? lane?.blocks[0];
      return lane === undefined || block === undefined
        ? { kind: 'nothing' }
        : { kind: 'block', lane: lane.pipette, block: block.id };
    }
    case 'Rehearse':
    case 'Forecast':
      return { kind: 'sweep', sweep };
    default:
      return area satisfies never;
  }
}
