/** Hands the browser a file to keep. The address is released once the browser has taken the data. */
export function keepFile(name: string, type: string, content: string | Blob): void {
  const blob = content instanceof Blob ? content : new Blob([content], { type });
  const address = URL.createObjectURL(blob);
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  document.body.append(link);
  link.click();
  link.remove();
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}

/** A file name out of words: letters, digits and hyphens only. */
export function fileStem(words: string): string {
  const stem = words
    .normalize('NFKD')
    .replaceAll(/[^\p{Letter}\p{Number}]+/gu, '-')
    .replaceAll(/^-+|-+$/g, '')
    .toLowerCase();
  return stem === '' ? 'chart' : stem.slice(0, 80);
}
