// RFC 8785 (2020), JSON Canonicalization Scheme. Its own samples: section 3.2.2 to 3.2.4 (the worked example and its
// UTF-8), section 3.2.3 (sorting), appendix B (numbers, given there as IEEE 754 bits).
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalJson } from '../../src-main/exchange/canonical-json.ts';

describe('canonical JSON, RFC 8785', () => {
  it('writes the worked example of section 3.2.2 as section 3.2.3 prints it', () => {
    const input = String.raw`{
      "numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001],
      "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/",
      "literals": [null, true, false]
    }`;
    const output = String.raw`{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\u000f\nA'B\"\\\\\"/"}`;
    expect(canonicalJson(JSON.parse(input))).toBe(output);
  });

  it('sorts names by UTF-16 code units, as the example of section 3.2.3', () => {
    const input = String.raw`{
      "\u20ac": "Euro Sign",
      "\r": "Carriage Return",
      "\ufb33": "Hebrew Letter Dalet With Dagesh",
      "1": "One",
      "\ud83d\ude00": "Emoji: Grinning Face",
      "\u0080": "Control",
      "\u00f6": "Latin Small Letter O With Diaeresis"
    }`;
    const inOrder = [
      'Carriage Return',
      'One',
      'Control',
      'Latin Small Letter O With Diaeresis',
      'Euro Sign',
      'Emoji: Grinning Face',
      'Hebrew Letter Dalet With Dagesh',
    ];
    const values = canonicalJson(JSON.parse(input)).match(/:"[^"]*"/g);
    expect(values?.map((value) => value.slice(2, -1))).toEqual(inOrder);
  });

  it.each([
    ['0000000000000000', '0'],
    ['8000000000000000', '0'],
    ['0000000000000001', '5e-324'],
    ['8000000000000001', '-5e-324'],
    ['7fefffffffffffff', '1.7976931348623157e+308'],
    ['ffefffffffffffff', '-1.7976931348623157e+308'],
    ['4340000000000000', '9007199254740992'],
    ['c340000000000000', '-9007199254740992'],
    ['4430000000000000', '295147905179352830000'],
    ['44b52d02c7e14af5', '9.999999999999997e+22'],
    ['44b52d02c7e14af6', '1e+23'],
    ['44b52d02c7e14af7', '1.0000000000000001e+23'],
    ['444b1ae4d6e2ef4e', '999999999999999700000'],
    ['444b1ae4d6e2ef4f', '999999999999999900000'],
    ['444b1ae4d6e2ef50', '1e+21'],
    ['3eb0c6f7a0b5ed8c', '9.999999999999997e-7'],
    ['3eb0c6f7a0b5ed8d', '0.000001'],
    ['41b3de4355555553', '333333333.3333332'],
    ['41b3de4355555554', '333333333.33333325'],
    ['41b3de4355555555', '333333333.3333333'],
    ['41b3de4355555556', '333333333.3333334'],
    ['41b3de4355555557', '333333333.33333343'],
    ['becbf647612f3696', '-0.0000033333333333333333'],
    ['43143ff3c1cb0959', '1424953923781206.2'],
  ])('writes the number of appendix B with bits %s as %s', (bits, text) => {
    const view = new DataView(new ArrayBuffer(8));
    view.setBigUint64(0, BigInt(`0x${bits}`));
    expect(canonicalJson(view.getFloat64(0))).toBe(text);
  });

  it.each([NaN, Infinity, -Infinity, '\ud800', { a: ['\udc00'] }, 1n, () => 0, [undefined], new Float64Array(1)])(
    'holds no %s',
    (value) => {
      expect(() => canonicalJson(value)).toThrow(Error);
    },
  );

  it('is the same text whatever the order of names, and reads back as the same value', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        // JSON has no negative zero.
        const plain = JSON.parse(JSON.stringify(value)) as unknown;
        const text = canonicalJson(plain);
        expect(canonicalJson(reversed(plain))).toBe(text);
        expect(JSON.parse(text)).toEqual(plain);
      }),
    );
  });
});

function reversed(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(reversed);
  if (typeof value !== 'object' || value === null) return value;
  const entries = Object.entries(value).map(([name, member]) => [name, reversed(member)] as const);
  return Object.fromEntries(entries.toReversed());
}
