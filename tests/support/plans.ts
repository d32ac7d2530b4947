// Small plans for tests of the forecast; the schema fills in what a test does not care about.
import {
  planSchema,
  type Block,
  type CellDocument,
  type PipetteDocument,
  type PlanDocument,
} from '../../src-main/contract/documents.ts';

export interface Membrane {
  /** Ω·cm². */
  readonly Rm: number;
  /** Ω·cm. */
  readonly Ri: number;
  /** µF/cm². */
  readonly Cm: number;
  readonly rest_mV?: number;
}

/** A passive soma with one unbranched stick, the same membrane everywhere. Branch 1 is the stick. */
export function ballAndStick(
  size: { readonly soma_um: number; readonly stick_um: number; readonly length_um: number },
  membrane: Membrane,
): unknown {
  const leak = { conductance_mS_cm2: 1000 / membrane.Rm, reversal_mV: membrane.rest_mV ?? -70 };
  return {
    kind: 'cell',
    format: 1,
    name: 'ball and stick',
    surroundings: { temperature_C: 22 },
    shape: {
      kind: 'generator',
      generator: {
        kind: 'ball-and-stick',
        somaDiameter_um: size.soma_um,
        stickDiameter_um: size.stick_um,
        stickLength_um: size.length_um,
      },
    },
    regions: [
      { name: 'soma', swcTypes: [1] },
      { name: 'dendrite', swcTypes: [2, 3, 4] },
    ],
    makeUp: ['soma', 'dendrite'].map((region) => ({
      region,
      capacitance_uF_cm2: membrane.Cm,
      axialResistivity_Ohm_cm: membrane.Ri,
      leak,
    })),
  };
}

/** Named compartments joined by conductances; channels by density in mS/cm². */
export function sketch(
  compartments: readonly { name: string; area_um2: number; Cm?: number; channels: Record<string, number> }[],
  couplings_nS: readonly (readonly [string, string, number])[] = [],
  channels: readonly unknown[] = [{ name: 'passive', reversal_mV: -70, gates: [] }],
): unknown {
  return {
    kind: 'cell',
    format: 1,
    name: 'sketch',
    surroundings: { temperature_C: 6.3 },
    channels,
    compartments: compartments.map(({ name, area_um2, Cm, channels: densities }) => ({
      name,
      area_um2,
      capacitance_uF_cm2: Cm ?? 1,
      channels: densities,
    })),
    couplings_nS,
  };
}

export interface PlanParts {
  readonly cell: unknown;
  readonly pipettes: readonly (Partial<PipetteDocument> & Pick<PipetteDocument, 'letter' | 'site' | 'mode'>)[];
  /** Per pipette. */
  readonly lanes: readonly { readonly holding: number; readonly blocks: readonly Block[] }[];
  readonly protocol?: Record<string, unknown>;
  readonly plan?: Record<string, unknown>;
}

export function planOf(parts: PlanParts): PlanDocument {
  return planSchema.parse({
    kind: 'plan',
    format: 1,
    name: 'test plan',
    cell: parts.cell as CellDocument,
    rig: {
      kind: 'rig',
      format: 1,
      name: 'test rig',
      pipettes: parts.pipettes.map((pipette) => ({ accessResistance_MOhm: 0, ...pipette })),
    },
    protocol: {
      kind: 'protocol',
      format: 1,
      name: 'test protocol',
      sampling_us: 20,
      sweepInterval_ms: 10_000,
      lanes: parts.lanes.map(({ holding, blocks }, l) => ({
        pipette: parts.pipettes[l]?.letter,
        unit: parts.pipettes[l]?.mode === 'voltage clamp' ? 'mV' : 'pA',
        holding,
        blocks,
      })),
      ...parts.protocol,
    },
    ...parts.plan,
  });
}

export const soma = { branch: 0, at_um: 0 };
