import { cutGrid } from '../../cell/cut.ts';
import { drawCell } from '../../cell/drawing.ts';
import { documentFormat, type CellDocument, type PlanDocument, type Site } from '../../contract/documents.ts';
import type { CellDrawing } from '../../contract/results.ts';
import { preparePlan } from '../../solver/prepare.ts';
import { inputResistance, slopeConductance, steadyTree } from '../../solver/steady.ts';
import { Refusal } from '../../units/refuse.ts';
import { fromSi } from '../../units/si.ts';
import type { WorkQuestion } from '../work.ts';

/** The cell to look at on the grid that these sites make, with its resting input resistance. @throws as `cutGrid`. */
export function cellDrawing({ cell, sites }: WorkQuestion<'drawing'>): CellDrawing {
  const drawing = drawCell(cell, cutGrid(cell, sites));
  return { ...drawing, inputResistance_MOhm: restingInputResistance(cell) };
}

/**
 * Input resistance at the root (the soma), MΩ, no pipette drawing current, gates following. Null where there is no
 * operating point, or where the cell at rest is not stable: it fires on its own.
 */
function restingInputResistance(cell: CellDocument): number | null {
  try {
    const plan = preparePlan(leftAlone(cell));
    const { state, firesOnItsOwn } = plan.start();
    if (firesOnItsOwn) return null;
    const slope = slopeConductance(plan.grid, plan.kinetics, plan.temperature, state.V);
    const R = fromSi(inputResistance(steadyTree(plan.grid, slope), 0), 'MOhm');
    return Number.isFinite(R) && R > 0 ? R : null;
  } catch (error) {
    // A channel without a name, no steady state: the shape can be drawn all the same, and the plan's check says what is wrong.
    if (error instanceof Refusal) return null;
    throw error;
  }
}

/** The least that can be rehearsed on a cell: a pipette at the root that passes no current. */
function leftAlone(cell: CellDocument): PlanDocument {
  const site: Site =
    'compartments' in cell ? { compartment: cell.compartments[0]?.name ?? '' } : { branch: 0, at_um: 0 };
  const name = 'left alone';
  return {
    kind: 'plan',
    format: documentFormat,
    name,
    note: '',
    tolerance: { unit: 'mV', value: 5 },
    probes: [],
    cell,
    rig: {
      kind: 'rig',
      format: documentFormat,
      name,
      note: '',
      pipettes: [
        {
          letter: 'A',
          site,
          mode: 'current clamp',
          accessResistance_MOhm: 0,
          strayCapacitance_pF: 0,
          bridge_MOhm: 0,
        },
      ],
    },
    protocol: {
      kind: 'protocol',
      format: documentFormat,
      name,
      note: '',
      sampling_us: 50,
      sweepInterval_ms: 1000,
      repeats: 1,
      carryOver: false,
      lanes: [{ pipette: 'A', unit: 'pA', holding: 0, blocks: [{ kind: 'hold', id: 'rest', duration_ms: 10 }] }],
      ladders: [],
      readings: [],
    },
  };
}
