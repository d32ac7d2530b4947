/** The memory of every typed array inside plain data, once each: given away instead of copied when it is posted. */
export function arraysIn(data: unknown, found = new Set<ArrayBuffer>()): ArrayBuffer[] {
  gather(data, found);
  return [...found];
}

function gather(data: unknown, found: Set<ArrayBuffer>): void {
  if (typeof data !== 'object' || data === null) return;
  if (ArrayBuffer.isView(data)) {
    if (data.buffer instanceof ArrayBuffer) found.add(data.buffer);
    return;
  }
  for (const item of Array.isArray(data) ? (data as unknown[]) : Object.values(data)) gather(item, found);
}
