/**
 * A value as canonical JSON: no white space, names sorted by UTF-16 code units, numbers as ECMAScript writes them.
 * Two documents are the same document exactly when these texts are equal; hashes are taken over the text's UTF-8.
 * Properties that are `undefined` are left out, as `JSON.stringify` does.
 * @throws Error for a number that is not finite, a lone surrogate, or anything JSON cannot hold: callers check first.
 * @source RFC 8785 (2020), JSON Canonicalization Scheme, section 3.2.
 */
export function canonicalJson(value: unknown): string {
  switch (typeof value) {
    case 'boolean':
      return value ? 'true' : 'false';
    case 'number':
      if (!Number.isFinite(value)) throw new Error(`canonical JSON holds no ${value}`);
      return JSON.stringify(value);
    case 'string':
      return canonicalString(value);
    case 'object':
      if (value === null) return 'null';
      if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
      if (ArrayBuffer.isView(value)) throw new Error('canonical JSON holds no typed array');
      return canonicalObject(value);
    default:
      throw new Error(`canonical JSON holds no ${typeof value}`);
  }
}

function canonicalString(text: string): string {
  if (!text.isWellFormed()) throw new Error('canonical JSON holds no lone surrogate');
  return JSON.stringify(text);
}

function canonicalObject(value: object): string {
  const members = Object.entries(value).filter(([, member]) => member !== undefined);
  // The default order of sort() is by UTF-16 code units, as section 3.2.3 asks.
  const byName = new Map<string, unknown>(members);
  const names = members.map(([name]) => name).sort();
  return `{${names.map((name) => `${canonicalString(name)}:${canonicalJson(byName.get(name))}`).join(',')}}`;
}
