// Bringing in a traced cell: the file is chosen, read, checked by the engine, and what was found is shown.
import type { CellDocument } from '../../src-main/contract/documents.ts';
import type { SwcReport } from '../../src-main/contract/results.ts';
import { askOrSay } from './ask.ts';
import { overlays } from './overlays.svelte.ts';

export interface ImportedSwc {
  readonly fileName: string;
  /** Null when the file was refused. */
  readonly cell: CellDocument | null;
  readonly report: SwcReport;
}

class SwcImportState {
  last = $state.raw<ImportedSwc | null>(null);
  isReading = $state(false);

  /** Opens the platform's file choice. */
  choose(): void {
    const input = document.createElement('input');
    input.type = 'file';
    input.accept = '.swc,text/plain';
    input.addEventListener('change', () => {
      const file = input.files?.[0];
      if (file !== undefined) void this.read(file);
    });
    input.click();
  }

  async read(file: File): Promise<void> {
    this.isReading = true;
    const bytes = new Uint8Array(await file.arrayBuffer());
    const name = file.name.replace(/\.swc$/i, '').slice(0, 200) || 'Traced cell';
    const answer = await askOrSay('cell import', { name, bytes });
    this.isReading = false;
    if (answer === null) return;
    this.last = { fileName: file.name, cell: answer.cell, report: answer.report };
    overlays.show({ kind: 'import report' });
  }
}

export const swcImport = new SwcImportState();
