import { createHash } from 'node:crypto';
import type { z } from 'zod';
import type { AnyDocument } from '../contract/documents.ts';
import { refuse } from '../units/refuse.ts';

/** A checked document and its canonical JSON (RFC 8785), which is what the notebook keeps and hashes. */
export interface Written<D extends AnyDocument = AnyDocument> {
  readonly document: D;
  readonly text: string;
}

/** SHA-256 of the text's UTF-8, 64 hexadecimal digits. @source FIPS 180-4. */
export function hashOf(text: string): string {
  return createHash('sha256').update(text, 'utf8').digest('hex');
}

/** A document read back, checked again: the file may have been elsewhere. @throws Refusal `file-unreadable`. */
export function readBack<S extends z.ZodType>(schema: S, text: string, place: string): z.output<S> {
  const outcome = schema.safeParse(JSON.parse(text));
  if (outcome.success) return outcome.data;
  return refuse('file-unreadable', {
    thing: 'document',
    place,
    value: outcome.error.issues[0]?.message ?? 'not readable',
    remedy: 'open a copy of the notebook made before this was changed',
  });
}

/** @throws Refusal `notebook-record-missing`. */
export function missingRecord(thing: string, id: number): never {
  const remedy = 'choose one that is in this notebook';
  return refuse('notebook-record-missing', { thing, place: 'notebook', value: `number ${id}`, remedy });
}
