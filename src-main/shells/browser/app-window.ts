import { spawn } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';

export interface AppWindow {
  /** How it ended, for people. */
  readonly ended: Promise<string>;
  readonly close: () => void;
}

/**
 * Opens an address in a window without browser furniture. Every user of the computer can read a command line, and the
 * address lets its reader in: so the browser is pointed at a file that only this user can read, which sends it on and is
 * gone once it has.
 */
export function openAppWindow(browser: string, newAddress: (onUse: () => void) => string): AppWindow {
  // The browser's own profile, too: one that already runs would take the window over, and never end.
  const folder = mkdtempSync(join(tmpdir(), 'holdfast-window-'));
  const page = join(folder, 'open.html');
  const address = newAddress(() => rmSync(page, { force: true }));
  writeFileSync(page, redirectPage(address), { mode: 0o600 });
  const child = spawn(
    browser,
    [
      `--app=${pathToFileURL(page).href}`,
      `--user-data-dir=${join(folder, 'profile')}`,
      '--window-size=1280,800',
      '--no-first-run',
      '--no-default-browser-check',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
    ],
    // Browsers chatter on stderr.
    { stdio: 'ignore' },
  );
  const ended = new Promise<string>((resolve) => {
    child.once('error', (cause) => resolve(cause.message));
    child.once('exit', (code, signal) => resolve(signal ?? `exit code ${String(code)}`));
  });
  void ended.then(() => {
    // Helper processes may still be writing to the profile.
    rmSync(folder, { recursive: true, force: true, maxRetries: 10, retryDelay: 100 });
  });
  return { ended, close: () => void child.kill() };
}

/** A page that goes on to the address by itself, leaving no trace in the history. */
function redirectPage(address: string): string {
  return `<!doctype html><meta charset="utf-8" /><title>Holdfast</title>
<script>location.replace(${JSON.stringify(address)});</script>
`;
}
