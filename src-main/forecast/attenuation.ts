// Two sites of a cell at DC: how a voltage set at one arrives at the other.
import type { DualSite } from '../contract/results.ts';
import type { PreparedPlan } from '../solver/prepare.ts';
import { operatingPointOf } from '../solver/start.ts';
import { attenuation, inputResistance, slopeConductance, steadyTree, transferResistance } from '../solver/steady.ts';
import { fromSi } from '../units/si.ts';

export interface DualSiteAnswer {
  /** Null with fewer than two pipettes, and where the notes say why. */
  readonly figures: DualSite | null;
  readonly notes: readonly string[];
}

/**
 * Attenuation |V_here / V_there| between the two pipettes' sites, in both directions, with input and transfer
 * resistance: at DC, gates linearised at the operating point, no pipette drawing current.
 *
 * @throws Refusal as `operatingPoint`.
 */
export function dualSiteOf(prepared: PreparedPlan): DualSiteAnswer {
  const [a, b] = prepared.pipettes;
  if (a === undefined || b === undefined) return { figures: null, notes: [] };
  const { grid, kinetics, temperature } = prepared;
  const { state, firesOnItsOwn } = prepared.plan.initial ? operatingPointOf(prepared) : prepared.start();
  const none = 'Attenuation between the two sites is not given:';
  if (firesOnItsOwn) {
    return { figures: null, notes: [`${none} the cell fires on its own, so there is no resting state to linearise.`] };
  }
  const tree = steadyTree(grid, slopeConductance(grid, kinetics, temperature, state.V));
  const resistances = [a, b].map(({ compartment }) => inputResistance(tree, compartment));
  if (!resistances.every((R) => R > 0 && Number.isFinite(R))) {
    return { figures: null, notes: [`${none} at the holding levels the free cell is not stable.`] };
  }
  return {
    figures: {
      from: a.letter,
      to: b.letter,
      attenuationAtoB: attenuation(tree, a.compartment, b.compartment),
      attenuationBtoA: attenuation(tree, b.compartment, a.compartment),
      inputResistanceA_MOhm: fromSi(resistances[0] ?? NaN, 'MOhm'),
      inputResistanceB_MOhm: fromSi(resistances[1] ?? NaN, 'MOhm'),
      transferResistance_MOhm: fromSi(transferResistance(tree, a.compartment, b.compartment), 'MOhm'),
    },
    notes: ['Attenuation is at DC, gates following, linearised at the operating point with no clamp active.'],
  };
}
