// How questions and answers travel over HTTP: JSON, with what JSON cannot hold beside it. Typed arrays and non-finite
// numbers are lifted out and listed with their paths, so no name in a user's document can be mistaken for a mark.

type Numbers = Float64Array | Float32Array | Int32Array | Uint32Array | Uint8Array;
type Path = readonly (string | number)[];

const kinds = {
  f64: Float64Array,
  f32: Float32Array,
  i32: Int32Array,
  u32: Uint32Array,
  u8: Uint8Array,
} as const;
type Kind = keyof typeof kinds;
const kindNames = Object.keys(kinds) as Kind[];

interface Found {
  readonly arrays: { readonly path: Path; readonly kind: Kind; readonly array: Numbers }[];
  readonly numbers: (readonly [Path, string])[];
}
interface Head {
  readonly value: unknown;
  /** Third entry: the count of numbers in a frame, the bytes as base64 in a text. */
  readonly arrays: (readonly [Path, Kind, number | string])[];
  readonly numbers: (readonly [Path, string])[];
}

/**
 * One block of bytes: the head's length as uint32 (little endian), the head as UTF-8 JSON, then each array's bytes,
 * every one starting at a multiple of eight. Numbers are in the machine's byte order; both ends are one machine.
 */
export function encodeFrame(value: unknown): Uint8Array<ArrayBuffer> {
  const found: Found = { arrays: [], numbers: [] };
  const plain = liftOut(value, [], found);
  const arrays = found.arrays.map(({ path, kind, array }) => [path, kind, array.length] as const);
  const head = new TextEncoder().encode(JSON.stringify({ value: plain, arrays, numbers: found.numbers }));
  const size = found.arrays.reduce((end, { array }) => aligned(end) + array.byteLength, 4 + head.length);
  const frame = new Uint8Array(size);
  new DataView(frame.buffer).setUint32(0, head.length, true);
  frame.set(head, 4);
  let end = 4 + head.length;
  for (const { array } of found.arrays) {
    frame.set(new Uint8Array(array.buffer, array.byteOffset, array.byteLength), aligned(end));
    end = aligned(end) + array.byteLength;
  }
  return frame;
}

/** The value a frame was made of. Arrays are views into the given bytes. @throws Error when it is not a whole frame. */
export function decodeFrame(bytes: ArrayBuffer): unknown {
  const length = new DataView(bytes).getUint32(0, true);
  const head = JSON.parse(new TextDecoder().decode(new Uint8Array(bytes, 4, length))) as Head;
  let end = 4 + length;
  return putBack(head, (kind, count) => {
    const array = new kinds[kind](bytes, aligned(end), Number(count));
    end = aligned(end) + array.byteLength;
    return array;
  });
}

/** The same as plain JSON, arrays in base64: for requests, which must be `application/json`. */
export function encodeText(value: unknown): string {
  const found: Found = { arrays: [], numbers: [] };
  const plain = liftOut(value, [], found);
  const arrays = found.arrays.map(({ path, kind, array }) => [path, kind, toBase64(array)] as const);
  return JSON.stringify({ value: plain, arrays, numbers: found.numbers });
}

/** Bytes encoded between two pauses; a multiple of three, so that pieces of base64 join. */
const piece_bytes = 3 * 2 ** 18;

/**
 * The same text as `encodeText` gives, in pieces, with a pause after each: large arrays do not hold up whoever waits.
 */
export async function encodePieces(value: unknown, pause: () => Promise<void>): Promise<string[]> {
  const found: Found = { arrays: [], numbers: [] };
  const plain = liftOut(value, [], found);
  const pieces = [`{"value":${JSON.stringify(plain)},"arrays":[`];
  for (const [i, { path, kind, array }] of found.arrays.entries()) {
    pieces.push(`${i === 0 ? '' : ','}[${JSON.stringify(path)},"${kind}","`);
    const bytes = new Uint8Array(array.buffer, array.byteOffset, array.byteLength);
    for (let start = 0; start < bytes.length; start += piece_bytes) {
      pieces.push(toBase64(bytes.subarray(start, start + piece_bytes)));
      await pause();
    }
    pieces.push('"]');
  }
  pieces.push(`],"numbers":${JSON.stringify(found.numbers)}}`);
  return pieces;
}

/** The value a text was made of. @throws Error when it is not such a text. */
export function decodeText(text: string): unknown {
  return putBack(JSON.parse(text) as Head, (kind, base64) => {
    const bytes = Uint8Array.from(atob(String(base64)), (letter) => letter.charCodeAt(0));
    return new kinds[kind](bytes.buffer);
  });
}

const aligned = (offset: number): number => Math.ceil(offset / 8) * 8;

function liftOut(value: unknown, path: Path, found: Found): unknown {
  if (typeof value === 'number' && !Number.isFinite(value)) {
    found.numbers.push([path, String(value)]);
    return null;
  }
  if (typeof value !== 'object' || value === null) return value;
  const kind = kindNames.find((name) => value instanceof kinds[name]);
  if (kind) {
    found.arrays.push({ path, kind, array: value as Numbers });
    return null;
  }
  if (Array.isArray(value)) return value.map((item: unknown, index) => liftOut(item, [...path, index], found));
  return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, liftOut(item, [...path, key], found)]));
}

function putBack(head: Head, array: (kind: Kind, given: number | string) => Numbers): unknown {
  const root = { value: head.value };
  for (const [path, kind, given] of head.arrays) {
    if (!kindNames.includes(kind)) throw new Error(`a frame holds an array of unknown kind ${kind}`);
    setAt(root, path, array(kind, given));
  }
  for (const [path, number] of head.numbers) setAt(root, path, Number(number));
  return root.value;
}

/** Fills a hole that liftOut left; only places that the JSON itself has can be filled. */
function setAt(root: { value: unknown }, path: Path, item: unknown): void {
  let place: unknown = root;
  let key: string | number = 'value';
  for (const next of path) {
    place = (place as Record<string | number, unknown>)[key];
    key = next;
    if (typeof place !== 'object' || place === null || !Object.hasOwn(place, key)) {
      throw new Error(`a frame names a place that it does not have: ${path.join('.')}`);
    }
  }
  (place as Record<string | number, unknown>)[key] = item;
}

function toBase64(array: Numbers): string {
  const bytes = new Uint8Array(array.buffer, array.byteOffset, array.byteLength);
  const parts: string[] = [];
  // In pieces, because every byte becomes an argument.
  for (let start = 0; start < bytes.length; start += 8192) {
    parts.push(String.fromCharCode(...bytes.subarray(start, start + 8192)));
  }
  return btoa(parts.join(''));
}
