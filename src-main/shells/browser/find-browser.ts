import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';

type Environment = Readonly<Record<string, string | undefined>>;

const commands = [
  'chromium',
  'chromium-browser',
  'google-chrome',
  'google-chrome-stable',
  'microsoft-edge',
  'brave-browser',
];
const macApplications = ['Google Chrome', 'Chromium', 'Microsoft Edge', 'Brave Browser'];
const windowsPrograms = ['Google\\Chrome\\Application\\chrome.exe', 'Microsoft\\Edge\\Application\\msedge.exe'];

/** The program of an installed browser of the Chromium family, or null. CHROMIUM names one and is taken as given. */
export function findBrowser(env: Environment = process.env, platform = process.platform): string | null {
  const named = env['CHROMIUM'];
  if (named) return named;
  return places(env, platform).find(isProgram) ?? null;
}

function places(env: Environment, platform: NodeJS.Platform): string[] {
  if (platform === 'darwin') return macApplications.map((name) => `/Applications/${name}.app/Contents/MacOS/${name}`);
  if (platform === 'win32') {
    const roots = [env['ProgramFiles'], env['ProgramFiles(x86)'], env['LOCALAPPDATA']];
    return roots.flatMap((root) => (root ? windowsPrograms.map((program) => join(root, program)) : []));
  }
  const folders = (env['PATH'] ?? '').split(delimiter).filter((folder) => folder !== '');
  return commands.flatMap((command) => folders.map((folder) => join(folder, command)));
}

function isProgram(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/** Whether a window can appear at all. */
export function hasDisplay(env: Environment = process.env, platform = process.platform): boolean {
  if (platform === 'darwin' || platform === 'win32') return true;
  return [env['DISPLAY'], env['WAYLAND_DISPLAY']].some((name) => name !== undefined && name !== '');
}
