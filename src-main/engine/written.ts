import type { AnyDocument, CellDocument, PlanDocument, ProtocolDocument, RigDocument } from '../contract/documents.ts';
import { canonicalJson } from '../exchange/canonical-json.ts';
import type { Written } from '../notebook/written.ts';

/** A document with its canonical JSON, as the notebook keeps it. */
export function written<D extends AnyDocument>(document: D): Written<D> {
  return { document, text: canonicalJson(document) };
}

export interface WrittenPlan {
  readonly plan: Written<PlanDocument>;
  readonly cell: Written<CellDocument>;
  readonly rig: Written<RigDocument>;
  readonly protocol: Written<ProtocolDocument>;
}

/** A plan and its three parts. */
export function writtenPlan(plan: PlanDocument): WrittenPlan {
  return {
    plan: written(plan),
    cell: written(plan.cell),
    rig: written(plan.rig),
    protocol: written(plan.protocol),
  };
}
