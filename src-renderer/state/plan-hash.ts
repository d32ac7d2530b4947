// Tells whether a stored rehearsal belongs to the plan as it stands: the same digest the notebook keeps.

/**
 * SHA-256, in hex, of the document in canonical JSON: keys sorted, no blanks, numbers as ECMAScript writes them.
 *
 * @source RFC 8785 (2020), JSON Canonicalization Scheme.
 */
export async function planHash(document: unknown): Promise<string> {
  const bytes = new TextEncoder().encode(canonicalJson(document));
  const digest = await crypto.subtle.digest('SHA-256', bytes);
  return Array.from(new Uint8Array(digest), (b) => b.toString(16).padStart(2, '0')).join('');
}

/** Canonical JSON of plain data; fields that are undefined are left out. */
export function canonicalJson(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonicalJson).join(',')}]`;
  if (typeof value === 'object' && value !== null) {
    const fields = Object.entries(value)
      .filter(([, field]) => field !== undefined)
      .sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0))
      .map(([key, field]) => `${JSON.stringify(key)}:${canonicalJson(field)}`);
    return `{${fields.join(',')}}`;
  }
  return JSON.stringify(value);
}
