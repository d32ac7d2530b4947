/** A document's name as the start of a file name: letters, digits, hyphens; never empty, never too long for a disk. */
export function fileName(name: string): string {
  const bare = name
    .normalize('NFC')
    .replaceAll(/[^\p{L}\p{N}]+/gu, '-')
    .replaceAll(/^-+|-+$/gu, '')
    .slice(0, 60);
  return bare === '' ? 'plan' : bare;
}
