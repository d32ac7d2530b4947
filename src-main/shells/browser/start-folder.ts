import { existsSync, lstatSync, readdirSync, realpathSync } from 'node:fs';
import { basename, dirname, extname, join, relative, resolve, sep } from 'node:path';
import type { FolderListing } from '../../contract/bridge.ts';
import type { RefusalCode, RefusalData } from '../../contract/refusal.ts';
import type { Answer } from '../../contract/requests.ts';
import { notebookEnding } from '../home.ts';

/** The one folder whose notebooks a page in a browser may name. Symbolic links that lead out of it do not count. */
export class StartFolder {
  readonly #root: string;

  /** @throws Error when the folder does not exist. */
  constructor(folder: string) {
    this.#root = realpathSync(folder);
  }

  /** Folders and notebooks in a folder, both sorted, hidden ones left out. */
  list(folder: string): Answer<FolderListing> {
    const place = this.#inside(folder);
    if (place === null) return no('file-outside-folder', folder, 'choose a folder below the start folder');
    try {
      const entries = readdirSync(place, { withFileTypes: true }).filter((entry) => !entry.name.startsWith('.'));
      const names = (wanted: (entry: (typeof entries)[number]) => boolean) =>
        entries
          .filter(wanted)
          .map((entry) => entry.name)
          .sort((a, b) => a.localeCompare(b));
      return {
        ok: true,
        value: {
          folder: relative(this.#root, place).split(sep).join('/'),
          folders: names((entry) => entry.isDirectory()),
          files: names((entry) => entry.isFile() && extname(entry.name) === notebookEnding),
        },
      };
    } catch {
      return no('file-unreadable', folder, 'choose a folder that exists and that you may read');
    }
  }

  /** The absolute path of a notebook to open. */
  existing(path: string): Answer<string> {
    const place = this.#inside(path);
    if (place === null) return no('file-outside-folder', path, 'choose a notebook below the start folder');
    if (extname(place) !== notebookEnding) return no('file-not-a-notebook', path, `choose a *${notebookEnding} file`);
    if (!existsSync(place)) return no('file-not-found', path, 'choose a notebook that exists');
    return { ok: true, value: place };
  }

  /** The absolute path of a notebook to make. What exists is never overwritten. */
  fresh(path: string): Answer<string> {
    const named = extname(path) === notebookEnding ? path : path + notebookEnding;
    const folder = this.#inside(dirname(named));
    if (folder === null) return no('file-outside-folder', path, 'choose a place below the start folder');
    if (!existsSync(folder)) return no('file-not-found', path, 'choose a folder that exists');
    const place = join(folder, basename(named));
    // Not existsSync: a link that leads nowhere is taken, too, and would be written through.
    if (lstatSync(place, { throwIfNoEntry: false })) return no('file-exists', path, 'choose another name');
    return { ok: true, value: place };
  }

  /** The real path; null when it lies outside. What does not exist is placed by its nearest parent that does. */
  #inside(path: string): string | null {
    if (path.includes('\0')) return null;
    let real = resolve(this.#root, path);
    const missing: string[] = [];
    while (!lstatSync(real, { throwIfNoEntry: false }) && dirname(real) !== real) {
      missing.unshift(basename(real));
      real = dirname(real);
    }
    try {
      real = join(realpathSync(real), ...missing);
    } catch {
      // A link that leads nowhere: there is no telling where it would end up.
      return null;
    }
    return real === this.#root || real.startsWith(this.#root + sep) ? real : null;
  }
}

function no(code: RefusalCode, path: string, remedy: string): { ok: false; refusals: [RefusalData] } {
  return { ok: false, refusals: [{ code, thing: 'path', place: 'start folder', value: path, remedy }] };
}
