// The cell of the rehearsal on show, cut for the sites it was rehearsed with: what its forecast's arrays are of.
import type { CellDrawing } from '../../src-main/contract/results.ts';
import { ask } from './ask.ts';
import { drawing, sitesOf } from './drawing.svelte.ts';
import { rehearsal } from './rehearsal.svelte.ts';

class RanCellState {
  #own = $state.raw<{ readonly rehearsalId: number; readonly drawing: CellDrawing } | null>(null);
  #asked = -1;

  /** Null until it is at hand. */
  readonly drawing: CellDrawing | null = $derived.by(() => {
    const { ran, stored } = rehearsal;
    const own = this.#own;
    if (own !== null && own.rehearsalId === stored?.summary.rehearsalId) return own.drawing;
    return ran !== null && drawing.isOf(ran) ? drawing.drawing : null;
  });

  /** Asks for the cell of the rehearsal on show, once it is not the one that is drawn anyway. */
  async follow(): Promise<void> {
    const { ran, stored, isCurrent } = rehearsal;
    const rehearsalId = stored?.summary.rehearsalId ?? -1;
    if (ran === null || isCurrent || this.#asked === rehearsalId) return;
    this.#asked = rehearsalId;
    const answer = await ask('cell drawing', { cell: ran.cell, sites: sitesOf(ran) });
    if (answer.ok && rehearsal.stored?.summary.rehearsalId === rehearsalId) {
      this.#own = { rehearsalId, drawing: answer.value };
    } else if (this.#asked === rehearsalId) this.#asked = -1;
  }
}

export const ranCell = new RanCellState();
