// The open cell as drawn, and the grid it will be computed on.
import type { CellDocument, PlanDocument, Site } from '../../src-main/contract/documents.ts';
import type { RefusalData } from '../../src-main/contract/refusal.ts';
import type { CellDrawing } from '../../src-main/contract/results.ts';
import { ask } from './ask.ts';
import { newestOnly } from './late.ts';

/** The places that compartments are cut for: pipettes, then probes. */
export function sitesOf(plan: PlanDocument): Site[] {
  return [...plan.rig.pipettes.map((p) => p.site), ...plan.probes.map((p) => p.site)];
}

class DrawingState {
  drawing = $state.raw<CellDrawing | null>(null);
  refusals = $state.raw<readonly RefusalData[]>([]);
  isAsking = $state(false);
  /** What the drawing is of. */
  #of = $state.raw<{ readonly cell: CellDocument; readonly sites: string } | null>(null);
  #cell: CellDocument | null = null;
  #sites = '';

  /** The drawing is of that plan's cell, cut for its sites. */
  isOf(plan: PlanDocument): boolean {
    return this.#of?.cell === plan.cell && this.#of.sites === JSON.stringify(sitesOf(plan));
  }

  /** Asks for the drawing when the cell or the sites on it changed. */
  follow(plan: PlanDocument): void {
    const sites = sitesOf(plan);
    const key = JSON.stringify(sites);
    if (plan.cell === this.#cell && key === this.#sites) return;
    this.#cell = plan.cell;
    this.#sites = key;
    this.isAsking = true;
    this.#ask({ cell: plan.cell, sites });
  }

  readonly #ask = newestOnly(120, async (question: { cell: CellDocument; sites: Site[] }, isNewest) => {
    const answer = await ask('cell drawing', question);
    if (!isNewest()) return;
    this.isAsking = false;
    if (answer.ok) {
      this.drawing = answer.value;
      this.#of = { cell: question.cell, sites: JSON.stringify(question.sites) };
      this.refusals = [];
    } else this.refusals = 'refusals' in answer ? answer.refusals : [];
  });
}

export const drawing = new DrawingState();
