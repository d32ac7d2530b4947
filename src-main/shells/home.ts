import { homedir } from 'node:os';
import { join } from 'node:path';

type Environment = Readonly<Record<string, string | undefined>>;

/** Where Holdfast keeps its own files when the user names no place. HOLDFAST_HOME replaces it. */
export function homeFolder(env: Environment = process.env, platform = process.platform, home = homedir()): string {
  const named = env['HOLDFAST_HOME'];
  if (named) return named;
  if (platform === 'darwin') return join(home, 'Library', 'Application Support', 'Holdfast');
  if (platform === 'win32') return join(env['APPDATA'] ?? join(home, 'AppData', 'Roaming'), 'Holdfast');
  // XDG Base Directory Specification 0.8: relative values are to be ignored.
  const data = env['XDG_DATA_HOME'];
  return join(data?.startsWith('/') ? data : join(home, '.local', 'share'), 'holdfast');
}

/** The notebook that opens when none is named; the engine makes it, with an example in it, on the first start. */
export function defaultNotebook(): string {
  return join(homeFolder(), 'Notebook.holdfast');
}

export const notebookEnding = '.holdfast';
