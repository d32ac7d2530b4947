// How large a file may be, looked at before it is read. Pure.
import type { Bridge } from '../../src-main/contract/bridge.ts';
import type { RefusalData } from '../../src-main/contract/refusal.ts';

/** As in the terminal. */
const mostFile_bytes = 100e6;
/** What the browser shell reads of one request; more it cuts off, and a page would think the server gone. */
export const mostRequest_bytes = 64 * 1024 * 1024;
/** In base64, a third longer, with what goes along. */
export const mostInBrowser_bytes = 50e6;

/** The refusal of a file for its size alone; null when it may be read. */
export function fileTooLarge(file: Pick<File, 'name' | 'size'>, shell: Bridge['shell']): RefusalData | null {
  const value = `${Math.round(file.size / 1e6)} MB`;
  const refusal = { code: 'too-large', thing: 'SWC file', place: file.name, value } as const;
  if (file.size > mostFile_bytes) {
    return { ...refusal, remedy: `give a file of at most ${mostFile_bytes / 1e6} MB` };
  }
  if (shell === 'browser' && file.size > mostInBrowser_bytes) {
    const remedy = `a browser tab takes at most ${mostInBrowser_bytes / 1e6} MB: open it in the desktop window, or give a smaller file`;
    return { ...refusal, remedy };
  }
  return null;
}
