// Looking at a file before SQLite does: what is not a notebook must not be touched, not even by a recovery.
import { closeSync, fstatSync, openSync, readSync, statSync } from 'node:fs';
import { refuse } from '../units/refuse.ts';
import { notebookFormat } from './migrations.ts';

/** Marks a SQLite file as a Holdfast notebook: the letters "Hold". */
export const applicationId = 0x486f6c64;

/**
 * Passes a file that is a notebook of a format this program knows, and whole as far as its length tells.
 * Offsets: 16 page size, 24 change counter, 28 length in pages, 60 user version, 68 application id, 92 the change counter
 * for which the length holds. A length kept by the log (`-wal`) is not judged here.
 * @throws Refusal `file-not-found`, `file-unreadable`, `file-not-a-notebook`, `notebook-newer-than-app`.
 * @source SQLite, "Database File Format", section 1.3.
 */
export function inspectFile(path: string): void {
  if (!mayBeFile(path)) return refuseOther(path);
  const { header, size } = readHeader(path);
  if (header.length < 100 || header.toString('latin1', 0, 16) !== 'SQLite format 3\0') return refuseOther(path);
  if (header.readUInt32BE(68) !== applicationId) return refuseOther(path);
  refuseNewerNotebook(path, header.readUInt32BE(60));

  const pageSize = header.readUInt16BE(16) === 1 ? 65536 : header.readUInt16BE(16);
  const lengthHolds = header.readUInt32BE(24) === header.readUInt32BE(92);
  const expected = header.readUInt32BE(28) * pageSize;
  if (lengthHolds && size < expected && !hasLog(path)) {
    refuse('file-unreadable', {
      thing: 'notebook',
      place: path,
      value: `cut short: ${size} of ${expected} bytes`,
      remedy: 'open a copy made before the damage; this file was left as it is',
    });
  }
}

/** @throws Refusal `notebook-newer-than-app` for a format above the program's own. */
export function refuseNewerNotebook(path: string, format: number): void {
  if (format <= notebookFormat) return;
  refuse('notebook-newer-than-app', {
    thing: 'notebook',
    place: path,
    value: `format ${format}`,
    remedy: `open it with a newer Holdfast; this one knows format ${notebookFormat}`,
  });
}

/** To open a pipe would wait for someone to write into it. What cannot be looked at says why when it is opened. */
function mayBeFile(path: string): boolean {
  try {
    return statSync(path).isFile();
  } catch {
    return true;
  }
}

function readHeader(path: string): { header: Buffer; size: number } {
  try {
    const file = openSync(path, 'r');
    try {
      const header = Buffer.alloc(100);
      const read = readSync(file, header, 0, 100, 0);
      return { header: header.subarray(0, read), size: fstatSync(file).size };
    } finally {
      closeSync(file);
    }
  } catch (cause) {
    const { code } = cause as NodeJS.ErrnoException;
    if (code === 'ENOENT' || code === 'ENOTDIR') {
      const remedy = 'choose a notebook that is there';
      return refuse('file-not-found', { thing: 'notebook', place: path, value: 'missing', remedy });
    }
    const remedy = 'check that you may read it';
    return refuse('file-unreadable', { thing: 'notebook', place: path, value: code ?? 'unreadable', remedy });
  }
}

function refuseOther(path: string): never {
  const remedy = 'choose a notebook; this file was left as it is';
  return refuse('file-not-a-notebook', { thing: 'file', place: path, value: 'something else', remedy });
}

function hasLog(path: string): boolean {
  return (statSync(`${path}-wal`, { throwIfNoEntry: false })?.size ?? 0) > 0;
}
