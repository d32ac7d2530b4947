import { z } from 'zod';
import {
  cellSchema,
  documentFormat,
  planFileSchema,
  protocolSchema,
  rigSchema,
} from '../src-main/contract/documents.ts';

const documents = { cell: cellSchema, rig: rigSchema, protocol: protocolSchema, plan: planFileSchema };

/** The four documents as JSON Schema (draft 2020-12), by file name. What a default fills in may be left out. */
export function publishedSchemas(): ReadonlyMap<string, object> {
  return new Map(
    Object.entries(documents).map(([kind, schema]) => [
      `${kind}.schema.json`,
      { title: `Holdfast ${kind}, format ${documentFormat}`, ...z.toJSONSchema(schema, { io: 'input' }) },
    ]),
  );
}
