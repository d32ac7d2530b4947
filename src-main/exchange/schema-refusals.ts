// From what the schema library finds to refusals a person can act on.
import type { z } from 'zod';
import type { RefusalCode, RefusalData } from '../contract/refusal.ts';
import { fieldThing, fieldValue, pathText, type FieldPath } from './field-words.ts';

type Issue = z.core.$ZodIssue;
type IssueOf<Code extends Issue['code']> = Extract<Issue, { code: Code }>;

/** A schema's issues, each with the document's own value beside it. `place` goes before every path. */
export function schemaRefusals(issues: readonly Issue[], document: unknown, place: string): RefusalData[] {
  return issues.flatMap((issue) => refusalsOf(issue, [], document, place));
}

/** `plan.json: lanes[0].holding`; either part may be empty. */
export function placeOf(place: string, path: FieldPath): string {
  const inside = pathText(path);
  if (place === '') return inside === '' ? 'document' : inside;
  return inside === '' ? place : `${place}: ${inside}`;
}

function refusalsOf(issue: Issue, above: FieldPath, document: unknown, place: string): RefusalData[] {
  const path = [...above, ...issue.path.map((part) => (typeof part === 'symbol' ? String(part) : part))];
  const value = valueAt(document, path);
  const no = (code: RefusalCode, remedy: string): RefusalData[] => [
    { code, thing: fieldThing(path), place: placeOf(place, path), value: fieldValue(value, path), remedy },
  ];
  if (issue.code === 'unrecognized_keys') return unknownFields(issue, path, value, place);
  if (value === undefined && issue.code !== 'custom') return no('document-field-missing', missingRemedy(issue));
  switch (issue.code) {
    case 'invalid_type':
      // JSON's 1e999 is read as infinite.
      return typeof value === 'number' && !Number.isFinite(value)
        ? no('quantity-out-of-range', 'give a finite number')
        : no('document-wrong-type', `give ${typeWords(issue.expected)}`);
    case 'too_small':
      return no('quantity-out-of-range', limitWords(issue.origin, 'at least', issue.minimum, issue.inclusive));
    case 'too_big':
      return no(
        issue.origin === 'number' ? 'quantity-out-of-range' : 'too-large',
        limitWords(issue.origin, 'at most', issue.maximum, issue.inclusive),
      );
    case 'invalid_value':
      return no(path.at(-1) === 'kind' ? 'document-wrong-kind' : 'document-wrong-type', choiceWords(issue.values));
    case 'invalid_union':
      return unionRefusals(issue, path, document, place, no);
    case 'custom':
      return no('quantity-out-of-range', issue.message);
    case 'invalid_format':
      return no('document-wrong-type', formatWords(issue));
    default:
      return no('document-wrong-type', issue.message);
  }
}

function unknownFields(issue: IssueOf<'unrecognized_keys'>, path: FieldPath, value: unknown, place: string) {
  return issue.keys.map((key): RefusalData => ({
    code: 'document-unknown-field',
    thing: `field "${key}"`,
    place: placeOf(place, [...path, key]),
    value: fieldValue(valueAt(value, [key]), [key]),
    remedy: 'remove it, or correct its name',
  }));
}

function unionRefusals(
  issue: IssueOf<'invalid_union'>,
  path: FieldPath,
  document: unknown,
  place: string,
  no: (code: RefusalCode, remedy: string) => RefusalData[],
): RefusalData[] {
  if ('options' in issue) {
    return no(path.at(-1) === 'kind' ? 'document-wrong-kind' : 'document-wrong-type', choiceWords(issue.options));
  }
  const [meant] = issue.errors.toSorted((a, b) => misfit(a) - misfit(b));
  if (!meant || meant.length === 0) return no('document-wrong-type', 'give exactly one of the forms described');
  return meant.flatMap((inner) => refusalsOf(inner, path, document, place));
}

/**
 * How unlike a document is to one form of a union: another kind counts most, then fields the form does not know, then
 * fields it misses at the top, then faults inside fields that fit. The form with the least is the one meant.
 */
function misfit(issues: readonly Issue[]): number {
  let sum = 0;
  for (const issue of issues) {
    const top = issue.path.length <= 1;
    if (issue.code === 'invalid_value' && issue.path.at(-1) === 'kind' && top) sum += 1000;
    else if (issue.code === 'unrecognized_keys' && issue.path.length === 0) sum += 100 * issue.keys.length;
    else if (top && issue.code === 'invalid_type') sum += issue.path.length === 0 ? 1000 : 90;
    else sum += 1;
  }
  return sum;
}

function valueAt(document: unknown, path: FieldPath): unknown {
  let value = document;
  for (const part of path) {
    if (typeof value !== 'object' || value === null || !Object.hasOwn(value, part)) return undefined;
    value = (value as Record<string | number, unknown>)[part];
  }
  return value;
}

function missingRemedy(issue: Issue): string {
  if (issue.code === 'invalid_type') return `give ${typeWords(issue.expected)}`;
  if (issue.code === 'invalid_value') return choiceWords(issue.values);
  if (issue.code === 'invalid_union' && 'options' in issue) return choiceWords(issue.options);
  return 'add it';
}

function typeWords(expected: string): string {
  const words: Readonly<Record<string, string>> = {
    number: 'a number',
    int: 'a whole number',
    string: 'a text',
    boolean: 'true or false',
    array: 'a list',
    tuple: 'a list of fixed length',
    object: 'a group of fields',
    record: 'a group of fields',
  };
  return words[expected] ?? expected;
}

function choiceWords(options: readonly unknown[]): string {
  return options.length === 1
    ? `give ${JSON.stringify(options[0])}`
    : `give one of ${options.map((option) => JSON.stringify(option)).join(', ')}`;
}

function limitWords(
  origin: string,
  bound: 'at least' | 'at most',
  limit: number | bigint,
  inclusive?: boolean,
): string {
  const beyond = bound === 'at least' ? 'above' : 'below';
  const amount = inclusive === false ? `${beyond} ${limit}` : `${bound} ${limit}`;
  if (origin === 'array') return `give ${amount} of them`;
  if (origin === 'string') return `give ${amount} characters`;
  return `give a value ${inclusive === false ? amount : `of ${amount}`}`;
}

function formatWords(issue: IssueOf<'invalid_format'>): string {
  if (issue.format === 'date') return 'give a date as year-month-day, such as 2026-03-14';
  if (issue.format === 'regex') return 'use 1 to 40 small letters, digits and hyphens';
  return issue.message;
}
