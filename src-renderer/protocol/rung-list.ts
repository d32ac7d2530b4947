import { givenNumber, parseQuantity, type Parsed } from '../text/quantity.ts';

/** Rungs as they are typed: numbers parted by commas, semicolons or blanks, each with or without its unit. */
export function rungText(list: readonly number[]): string {
  return list.map((value) => givenNumber(value)).join(', ');
}

export type ParsedRungs =
  { readonly ok: true; readonly list: number[] } | { readonly ok: false; readonly words: string };

/** Reads a typed list; says which entry is wrong. A unit may follow its number after a blank. */
export function parseRungs(text: string, unit: string): ParsedRungs {
  const parts = text
    .split(/[,;\n]+|\s+(?=[-−–+.\d])/)
    .map((part) => part.trim())
    .filter((part) => part !== '');
  if (parts.length === 0) return { ok: false, words: 'Type at least one number.' };
  if (parts.length > 10_000) return { ok: false, words: 'At most 10000 rungs.' };
  const list: number[] = [];
  for (const [i, part] of parts.entries()) {
    const parsed: Parsed = parseQuantity(part, unit);
    if (!parsed.ok) return { ok: false, words: `Entry ${i + 1}: ${parsed.words}` };
    list.push(parsed.value);
  }
  return { ok: true, list };
}
