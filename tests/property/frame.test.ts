import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decodeFrame, decodeText, encodeFrame, encodeText } from '../../src-main/contract/frame.ts';

const leaf = fc.oneof(
  fc.double(),
  fc.string(),
  fc.boolean(),
  fc.constant(null),
  fc.float64Array(),
  fc.float32Array(),
  fc.int32Array(),
  fc.uint32Array(),
  fc.uint8Array(),
);
const anything = fc.object({ values: [leaf], maxDepth: 4 });

// JSON knows one zero only; no document or result tells them apart.
const withOneZero = (value: unknown): unknown =>
  Object.is(value, -0)
    ? 0
    : Array.isArray(value)
      ? value.map(withOneZero)
      : typeof value === 'object' && value !== null && !ArrayBuffer.isView(value)
        ? Object.fromEntries(Object.entries(value).map(([key, item]) => [key, withOneZero(item)]))
        : value;

describe('what travels between a page and the browser shell', () => {
  it('comes out of a frame as it went in, bit for bit', () => {
    fc.assert(
      fc.property(anything, (value) => {
        expect(decodeFrame(encodeFrame(value).buffer)).toEqual(withOneZero(value));
      }),
    );
  });

  it('comes out of a text as it went in, bit for bit', () => {
    fc.assert(
      fc.property(anything, (value) => {
        expect(decodeText(encodeText(value))).toEqual(withOneZero(value));
      }),
    );
  });

  it('may be a part of a larger array', () => {
    const part = Float64Array.of(1, 2, 3, 4).subarray(1, 3);
    expect(decodeFrame(encodeFrame({ part }).buffer)).toEqual({ part: Float64Array.of(2, 3) });
    expect(decodeText(encodeText({ part }))).toEqual({ part: Float64Array.of(2, 3) });
  });

  it('fills only places that the text itself has', () => {
    const forged = JSON.stringify({ value: {}, arrays: [], numbers: [[['__proto__', 'reach'], 'NaN']] });
    expect(() => decodeText(forged)).toThrow('a place that it does not have');
    expect(Object.prototype).not.toHaveProperty('reach');
  });

  it('refuses an array of a kind it does not know', () => {
    const forged = JSON.stringify({ value: [null], arrays: [[[0], 'constructor', '']], numbers: [] });
    expect(() => decodeText(forged)).toThrow('unknown kind');
  });
});
