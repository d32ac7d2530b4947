// A display for windows under test.
import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { hasDisplay } from '../../src-main/shells/browser/find-browser.ts';

export interface Display {
  readonly name: string | undefined;
  readonly close: () => void;
}

export const hasXvfb = (): boolean =>
  (process.env['PATH'] ?? '').split(':').some((folder) => existsSync(`${folder}/Xvfb`));

export const mayHaveDisplay = (): boolean => hasDisplay() || hasXvfb();

/** The machine's display, or one that nobody sees. */
export async function openDisplay(): Promise<Display> {
  if (hasDisplay()) return { name: process.env['DISPLAY'], close: () => undefined };
  // It chooses a free number itself and writes it to the fourth stream.
  const server = spawn('Xvfb', ['-displayfd', '3', '-screen', '0', '1920x1080x24', '-nolisten', 'tcp'], {
    stdio: ['ignore', 'ignore', 'ignore', 'pipe'],
  });
  const number = await new Promise<string>((done, fail) => {
    server.stdio[3]?.once('data', (digits: Buffer) => done(digits.toString().trim()));
    server.once('error', fail);
    server.once('exit', (code) => fail(new Error(`Xvfb ended with code ${String(code)}`)));
  });
  return { name: `:${number}`, close: () => void server.kill() };
}
