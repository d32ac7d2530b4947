// Bringing in a traced cell: the file is chosen, read, checked by the engine, and what was found is shown.
import type { CellDocument } from '../../src-main/contract/documents.ts';
import type { SwcReport } from '../../src-main/contract/results.ts';
import { bridge } from '../bridge.ts';
import { fullReport } from '../text/swc-words.ts';
import { askOrSay } from './ask.ts';
import { fileTooLarge } from './file-limits.ts';
import { jobs } from './jobs.svelte.ts';
import { notices } from './notices.svelte.ts';
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

  /** Reads a file, unless its size alone says no. */
  async read(file: File): Promise<void> {
    const refusal = fileTooLarge(file, bridge.shell);
    if (refusal !== null) {
      notices.refuse([refusal]);
      return;
    }
    this.isReading = true;
    const jobId = crypto.randomUUID();
    jobs.begin(jobId, `Reading ${file.name}`, 'unpacking and checking it');
    try {
      await this.#take(file);
    } finally {
      jobs.end(jobId);
      this.isReading = false;
    }
  }

  async #take(file: File): Promise<void> {
    const bytes = await file.arrayBuffer().then(
      (buffer) => new Uint8Array(buffer),
      () => null,
    );
    if (bytes === null) {
      const remedy = 'check that it is there and that you may read it';
      notices.refuse([{ code: 'file-unreadable', thing: 'SWC file', place: file.name, value: 'not readable', remedy }]);
      return;
    }
    const name = file.name.replace(/\.swc$/i, '').slice(0, 200) || 'Traced cell';
    const answer = await askOrSay('cell import', { name, bytes });
    if (answer === null) return;
    this.last = { fileName: file.name, cell: answer.cell, report: fullReport(answer.report, bytes) };
    overlays.show({ kind: 'import report' });
  }
}

export const swcImport = new SwcImportState();
