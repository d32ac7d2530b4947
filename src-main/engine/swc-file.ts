// An SWC file on disk, read; its size is looked at first.
import { readFileSync } from 'node:fs';
import { readSwc, type SwcReading } from '../cell/swc-read.ts';
import { mostBytes } from '../cell/swc-text.ts';
import { mustBeReadable, refuseUnread } from './file-size.ts';

/**
 * @throws Refusal `file-not-found`, `file-unreadable`, `too-large` above 100 MB.
 */
export function readSwcFile(path: string): SwcReading {
  return readSwc(swcBytes(path));
}

/** @throws Refusal as `readSwcFile`. */
export function swcBytes(path: string): Uint8Array {
  const thing = 'SWC file';
  mustBeReadable(path, thing, mostBytes);
  try {
    return readFileSync(path);
  } catch (cause) {
    return refuseUnread(path, thing, cause);
  }
}
