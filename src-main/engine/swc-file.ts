// An SWC file on disk, read; its size is looked at first.
import { readFile, stat } from 'node:fs/promises';
import { readSwc, type SwcReading } from '../cell/swc-read.ts';
import { mostBytes } from '../cell/swc-text.ts';
import { refuse } from '../units/refuse.ts';

/**
 * @throws Refusal `file-not-found`, `file-unreadable`, `too-large` above 100 MB.
 */
export async function readSwcFile(path: string): Promise<SwcReading> {
  const size = await onDisk(path, async () => (await stat(path)).size);
  if (size > mostBytes)
    return refuse('too-large', {
      thing: 'SWC file',
      place: path,
      value: `${Math.round(size / 1e6)} MB`,
      remedy: 'give a file of at most 100 MB',
    });
  return readSwc(await onDisk(path, () => readFile(path)));
}

async function onDisk<T>(path: string, read: () => Promise<T>): Promise<T> {
  try {
    return await read();
  } catch (cause) {
    const code = cause instanceof Error && 'code' in cause ? String(cause.code) : 'unknown';
    return refuse(code === 'ENOENT' ? 'file-not-found' : 'file-unreadable', {
      thing: 'SWC file',
      place: path,
      value: code,
      remedy: code === 'ENOENT' ? 'check the path' : 'check that it is a file and that you may read it',
    });
  }
}
