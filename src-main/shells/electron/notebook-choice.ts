import { dialog, type BrowserWindow } from 'electron';
import { extname } from 'node:path';
import type { Answer, Answers, RequestName } from '../../contract/requests.ts';
import { notebookEnding } from '../home.ts';

const namesPath: ReadonlySet<string> = new Set<RequestName>(['notebook create', 'notebook open', 'notebook save as']);
const filters = [{ name: 'Holdfast notebook', extensions: [notebookEnding.slice(1)] }];

/**
 * The notebook files a page may name: those the user chose in a dialog or gave at the start, and those that were open.
 * A page that went astray could otherwise have the engine write anywhere.
 */
export class NotebookChoice {
  readonly #chosen = new Set<string>();

  allow(path: string): void {
    this.#chosen.add(path);
  }

  /** The platform's dialog. Null when the user thinks better of it. */
  async choose(window: BrowserWindow, what: 'open' | 'save', suggestion: string): Promise<string | null> {
    const path = what === 'open' ? await pickExisting(window) : await pickFresh(window, suggestion);
    if (path !== null) this.allow(path);
    return path;
  }

  /** Null when the question may go to the engine. */
  refusal(name: string, question: unknown): Answer | null {
    if (!namesPath.has(name) || typeof question !== 'object' || question === null || !('path' in question)) return null;
    const { path } = question;
    if (typeof path !== 'string' || this.#chosen.has(path)) return null;
    const remedy = 'choose the notebook in the dialog';
    return {
      ok: false,
      refusals: [{ code: 'file-outside-folder', thing: 'notebook', place: 'this window', value: path, remedy }],
    };
  }

  /** Notes what the engine has opened. */
  learn(name: string, answer: Answer): void {
    if (answer.ok && (namesPath.has(name) || name === 'notebook status')) {
      this.allow((answer.value as Answers['notebook status']).path);
    }
  }
}

async function pickExisting(window: BrowserWindow): Promise<string | null> {
  const { filePaths } = await dialog.showOpenDialog(window, { filters, properties: ['openFile'] });
  return filePaths[0] ?? null;
}

async function pickFresh(window: BrowserWindow, suggestion: string): Promise<string | null> {
  const { filePath } = await dialog.showSaveDialog(window, { filters, defaultPath: suggestion });
  if (!filePath) return null;
  return extname(filePath) === notebookEnding ? filePath : filePath + notebookEnding;
}
