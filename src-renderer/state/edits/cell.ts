// Changes of the cell in a plan. Pure.
import type {
  CellDocument,
  MakeUpDocument,
  PlanDocument,
  RegionDocument,
  ShapedCellDocument,
} from '../../../src-main/contract/documents.ts';

/** The cell if it is given by its shape; a sketch has no regions. */
export function shaped(cell: CellDocument): ShapedCellDocument | null {
  return 'shape' in cell ? cell : null;
}

export function withCell(plan: PlanDocument, fields: { name?: string; note?: string }): PlanDocument {
  return { ...plan, cell: { ...plan.cell, ...fields } };
}

export function withTemperature(plan: PlanDocument, temperature_C: number): PlanDocument {
  return { ...plan, cell: { ...plan.cell, surroundings: { ...plan.cell.surroundings, temperature_C } } };
}

function withShaped(plan: PlanDocument, change: (cell: ShapedCellDocument) => ShapedCellDocument): PlanDocument {
  const cell = shaped(plan.cell);
  return cell === null ? plan : { ...plan, cell: change(cell) };
}

/** What a region's membrane is made of; null where none is given. */
export function makeUpOf(plan: PlanDocument, region: string): MakeUpDocument | null {
  return shaped(plan.cell)?.makeUp.find((m) => m.region === region) ?? null;
}

export function withMakeUp(
  plan: PlanDocument,
  region: string,
  change: (makeUp: MakeUpDocument) => MakeUpDocument,
): PlanDocument {
  return withShaped(plan, (cell) => ({
    ...cell,
    makeUp: cell.makeUp.map((m) => (m.region === region ? change(m) : m)),
  }));
}

/** Puts a channel into a region with a density of 0, which changes nothing yet; where it is already, it stays as it is. */
export function withChannel(plan: PlanDocument, region: string, channel: string): PlanDocument {
  return withMakeUp(plan, region, (m) =>
    m.channels.some((c) => c.channel === channel)
      ? m
      : { ...m, channels: [...m.channels, { channel, density_mS_cm2: 0 }] },
  );
}

/** Changes a region's own fields; a new name goes through to its make-up. */
export function withRegion(plan: PlanDocument, region: string, fields: Partial<RegionDocument>): PlanDocument {
  return withShaped(plan, (cell) => ({
    ...cell,
    regions: cell.regions.map((r) => (r.name === region ? { ...r, ...fields } : r)),
    makeUp:
      fields.name === undefined
        ? cell.makeUp
        : cell.makeUp.map((m) => (m.region === region ? { ...m, region: fields.name ?? m.region } : m)),
  }));
}

/** Cuts a region in two at a path distance: the far part becomes a region of its own with the same make-up. */
export function withRegionCut(plan: PlanDocument, region: string, at_um: number): PlanDocument {
  return withShaped(plan, (cell) => {
    const i = cell.regions.findIndex((r) => r.name === region);
    const near = cell.regions[i];
    const makeUp = cell.makeUp.find((m) => m.region === region);
    if (near === undefined || makeUp === undefined) return cell;
    const name = freeName(cell, `${region}, far`);
    const far: RegionDocument = { ...near, name, from_um: at_um };
    const regions = [...cell.regions];
    regions.splice(i, 1, { ...near, to_um: at_um }, far);
    return { ...cell, regions, makeUp: [...cell.makeUp, { ...makeUp, region: name }] };
  });
}

/** Takes a region away; its cable falls to the first other region that fits it. The last one stays. */
export function withoutRegion(plan: PlanDocument, region: string): PlanDocument {
  return withShaped(plan, (cell) =>
    cell.regions.length === 1
      ? cell
      : {
          ...cell,
          regions: cell.regions.filter((r) => r.name !== region),
          makeUp: cell.makeUp.filter((m) => m.region !== region),
        },
  );
}

function freeName(cell: ShapedCellDocument, wanted: string): string {
  const taken = new Set(cell.regions.map((r) => r.name));
  let name = wanted;
  for (let n = 2; taken.has(name); n++) name = `${wanted} ${n}`;
  return name;
}
