// JSON text to a checked document: every fault at once, each with its path, value and remedy. No disk.
import type { z } from 'zod';
import {
  cellSchema,
  documentFormat,
  planFileSchema,
  planSchema,
  protocolSchema,
  rigSchema,
  type AnyDocument,
  type CellDocument,
  type PlanDocument,
  type PlanFile,
} from '../contract/documents.ts';
import type { RefusalData } from '../contract/refusal.ts';
import { Refusal, refuse } from '../units/refuse.ts';
import { jsonFault } from './json-fault.ts';
import { refuseDeep } from './nesting.ts';
import { placeOf, schemaRefusals } from './schema-refusals.ts';

const wholeSchemas = { cell: cellSchema, rig: rigSchema, protocol: protocolSchema, plan: planSchema } as const;
type Kind = keyof typeof wholeSchemas;
type DocumentOf<K extends Kind> = Extract<AnyDocument, { kind: K }>;

/**
 * A cell, rig, protocol or whole plan out of its JSON text, told apart by `kind`; `kind` may be demanded.
 * `place` is where the text comes from, for the refusals: a file's name, or "".
 * @throws Refusal `document-not-json` with line and column; `document-wrong-kind`; `document-newer-than-app`;
 *         `document-unknown-field`, `document-field-missing`, `document-wrong-type`, `quantity-out-of-range`, ... with
 *         every fault of the document listed.
 */
export function readDocument<K extends Kind = Kind>(text: string, place: string, kind?: K): DocumentOf<K> {
  const value = readJson(text, place);
  const found = kindOf(value, place, kind === undefined ? kinds : [kind]);
  return checked(wholeSchemas[found], value, place) as DocumentOf<K>;
}

/** A plan as it lies in a folder: its parts whole or named as files. @throws Refusal as `readDocument`. */
export function readPlanFile(text: string, place: string): PlanFile {
  const value = readJson(text, place);
  kindOf(value, place, ['plan']);
  return checked(planFileSchema, value, place);
}

/** Gives the text of a file named relative to the plan; throws a Refusal when it cannot. */
export type ReadText = (path: string) => string;

/**
 * A plan with everything in it: `{file}` parts read through `read`, shape files put in as text. A file named inside a
 * part is relative to that part. Shape files come through `readShape`: they may be in another encoding. `place` is the
 * plan file's own name.
 * @throws Refusal as `readDocument`, and whatever `read` throws.
 */
export function wholePlan(plan: PlanFile, read: ReadText, readShape: ReadText = read): PlanDocument {
  const cell = 'file' in plan.cell ? readDocument(read(plan.cell.file), plan.cell.file, 'cell') : plan.cell;
  const cellFile = 'file' in plan.cell ? plan.cell.file : '';
  return {
    ...plan,
    cell: wholeCell(cell, (path) => readShape(besideFile(cellFile, path))),
    rig: 'file' in plan.rig ? readDocument(read(plan.rig.file), plan.rig.file, 'rig') : plan.rig,
    protocol:
      'file' in plan.protocol ? readDocument(read(plan.protocol.file), plan.protocol.file, 'protocol') : plan.protocol,
  };
}

/** A cell whose shape stands in it as text. @throws Refusal whatever `read` throws. */
export function wholeCell(cell: CellDocument, read: ReadText): CellDocument {
  if (!('shape' in cell) || cell.shape.kind !== 'swc' || !('file' in cell.shape)) return cell;
  const { file } = cell.shape;
  return { ...cell, shape: { kind: 'swc', text: read(file), fileName: file.split('/').at(-1) ?? file } };
}

/** A checked document out of a value that came from elsewhere. @throws Refusal listing every fault; `too-large` where it is nested too deep. */
export function checked<S extends z.ZodType>(schema: S, value: unknown, place: string): z.output<S> {
  refuseDeep(value, place);
  const outcome = schema.safeParse(value);
  if (outcome.success) return outcome.data;
  const [first, ...others] = schemaRefusals(outcome.error.issues, value, place);
  if (!first) throw new Error('the schema found a fault and named none', { cause: outcome.error });
  throw new Refusal([first, ...others]);
}

const kinds = Object.keys(wholeSchemas) as Kind[];

function readJson(text: string, place: string): unknown {
  // A byte order mark is let pass, as RFC 8259, section 8.1, allows.
  const bare = text.startsWith('\ufeff') ? text.slice(1) : text;
  try {
    return JSON.parse(bare);
  } catch (cause) {
    const fault = jsonFault(bare);
    if (!fault) throw cause;
    const data: RefusalData = {
      code: 'document-not-json',
      thing: 'text',
      place: `${placeOf(place, [])}, line ${fault.line}, column ${fault.column}`,
      value: fault.found,
      remedy: `put ${fault.expected} there`,
    };
    throw new Refusal(data, { cause });
  }
}

function kindOf(value: unknown, place: string, allowed: readonly Kind[]): Kind {
  const choice = allowed.map((kind) => `"${kind}"`).join(', ');
  if (typeof value !== 'object' || value === null || Array.isArray(value)) {
    return refuse('document-wrong-type', {
      thing: 'document',
      place: placeOf(place, []),
      value: Array.isArray(value) ? 'a list' : String(value),
      remedy: `give a group of fields with "kind": ${choice}`,
    });
  }
  refuseNewer(value, place);
  const given = (value as { kind?: unknown }).kind;
  const kind = allowed.find((each) => each === given);
  if (kind) return kind;
  return refuse(given === undefined ? 'document-field-missing' : 'document-wrong-kind', {
    thing: 'kind',
    place: placeOf(place, ['kind']),
    value: given === undefined ? 'missing' : JSON.stringify(given),
    remedy: `give ${allowed.length > 1 ? 'one of ' : ''}${choice}`,
  });
}

/** Before anything else is said: a newer document may have any fields. Parts of a plan carry their own format. */
function refuseNewer(value: object, place: string): void {
  const parts: [string[], unknown][] = [[[], value]];
  for (const part of ['cell', 'rig', 'protocol']) parts.push([[part], (value as Record<string, unknown>)[part]]);
  const newer = parts.flatMap(([path, part]): RefusalData[] => {
    const format = (part as { format?: unknown } | null | undefined)?.format;
    if (typeof format !== 'number' || format <= documentFormat) return [];
    return [
      {
        code: 'document-newer-than-app',
        thing: 'format',
        place: placeOf(place, [...path, 'format']),
        value: String(format),
        remedy: `open it with a newer Holdfast; this one knows format ${documentFormat}`,
      },
    ];
  });
  const [first, ...others] = newer;
  if (first) throw new Refusal([first, ...others]);
}

function besideFile(file: string, path: string): string {
  const cut = file.lastIndexOf('/');
  return cut < 0 || path.startsWith('/') ? path : `${file.slice(0, cut)}/${path}`;
}
