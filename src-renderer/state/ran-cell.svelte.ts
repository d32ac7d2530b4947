// The cell of the rehearsal on show, cut for the sites it was rehearsed with: what its forecast's arrays are of.
import type { CellDrawing, StoredRehearsal } from '../../src-main/contract/results.ts';
import { ask } from './ask.ts';
import { drawing, sitesOf } from './drawing.svelte.ts';
import { rehearsal } from './rehearsal.svelte.ts';

class RanCellState {
  #own = $state.raw<{ readonly rehearsalId: number; readonly drawing: CellDrawing } | null>(null);

  /** Null until it is at hand. */
  readonly drawing: CellDrawing | null = $derived.by(() => {
    const shown = rehearsal.stored?.summary.rehearsalId;
    const own = this.#own;
    if (own !== null && own.rehearsalId === shown) return own.drawing;
    return rehearsal.isCurrent ? drawing.drawing : null;
  });

  /** Asks for the cell of a rehearsal that comes on show. */
  async follow({ summary, plan }: StoredRehearsal): Promise<void> {
    const answer = await ask('cell drawing', { cell: plan.cell, sites: sitesOf(plan) });
    if (answer.ok && rehearsal.stored?.summary.rehearsalId === summary.rehearsalId) {
      this.#own = { rehearsalId: summary.rehearsalId, drawing: answer.value };
    }
  }
}

export const ranCell = new RanCellState();
