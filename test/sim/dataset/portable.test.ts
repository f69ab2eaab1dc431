import { Buffer } from 'node:buffer';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fromPortable, fromPortableLazily, longestExact, toPortable } from '../../../sim/dataset/portable.ts';

const finite = fc.double({ noNaN: true, noDefaultInfinity: true });
const throughJson = (value: unknown) => fromPortable(JSON.parse(JSON.stringify(toPortable(value))));

describe('portable', () => {
  test('every finite number comes back bit for bit, minus zero and the smallest included', () => {
    fc.assert(
      fc.property(fc.float64Array({ noNaN: true, noDefaultInfinity: true, maxLength: 50 }), (data) => {
        const back = throughJson({ data }) as { data: Float64Array };
        expect(back.data).toBeInstanceOf(Float64Array);
        expect(new Uint8Array(back.data.buffer)).toEqual(new Uint8Array(data.slice().buffer));
      }),
    );
  });

  test('plain data passes through unchanged', () => {
    const plain = fc.dictionary(
      fc.string(),
      fc.oneof(
        finite.map((x) => x + 0),
        fc.string(),
        fc.boolean(),
        fc.array(fc.string()),
      ),
    );
    fc.assert(
      fc.property(plain, (value) => {
        expect(fromPortable(toPortable(value))).toEqual(value);
      }),
    );
  });

  // Node's Buffer is an independent writer of RFC 4648 base64 and of little-endian doubles.
  test('the text is the base64 that Buffer writes, for every remainder of three and a long one', () => {
    for (const length of [0, 1, 2, 3, 4, 5, 5000]) {
      const data = Float64Array.from({ length }, (_, index) => Math.sqrt(index + 0.1));
      const bytes = Buffer.alloc(8 * length);
      for (const [index, value] of data.entries()) bytes.writeDoubleLE(value, 8 * index);
      expect(toPortable(data)).toEqual({ f8: bytes.toString('base64') });
    }
  });

  test('a part of a larger buffer is written as that part', () => {
    const whole = Float64Array.of(1, 2, 3, 4);
    expect(fromPortable(toPortable(whole.subarray(1, 3)))).toEqual(Float64Array.of(2, 3));
  });

  test.each([Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])(
    '%s is refused wherever it stands',
    (bad) => {
      expect(() => toPortable({ cases: [{ value: bad }] })).toThrow('result.cases.0.value: ');
      expect(() => toPortable({ data: Float64Array.of(0, 1, bad) })).toThrow('result.data.2: ');
    },
  );

  test('what could not come back as it was is refused', () => {
    expect(() => toPortable({ law: () => 0 })).toThrow('a function cannot be stored');
    expect(() => toPortable({ variables: { f8: 'text' } })).toThrow('would be read back as numbers');
    expect(() => fromPortable({ f8: 'AAAA' })).toThrow('cut short');
  });
});

test('long fields go in single precision', () => {
  const field = Float64Array.from({ length: longestExact + 1 }, (_, i) => 250 + Math.sin(i));
  const stored = toPortable({ field }) as { field: { f4: string } };
  expect(Object.keys(stored.field)).toEqual(['f4']);
  const { field: read } = fromPortable<{ field: Float64Array }>(JSON.parse(JSON.stringify(stored)));
  expect(read).toHaveLength(field.length);
  // Half a unit in the last of 24 binary digits.
  for (const [i, value] of field.entries()) expect(Math.abs(read[i] / value - 1)).toBeLessThan(6e-8);
});

describe('decoded as it is read', () => {
  const long = Float64Array.from({ length: longestExact + 1 }, (_, at) => at);
  const stored = toPortable({
    name: 'a',
    long,
    fields: [{ data: Float64Array.of(1, 2, 3) }],
    last: Float64Array.of(4),
  });

  test('is the same data', () => {
    expect(fromPortableLazily(stored)).toEqual(fromPortable(stored));
  });

  test('gives one and the same array however often it is read', () => {
    const { last } = fromPortableLazily<{ last: Float64Array }>(stored);
    const holder = fromPortableLazily<{ last: Float64Array }>(stored);
    expect(last).toEqual(Float64Array.of(4));
    expect(holder.last).toBe(holder.last);
  });

  test('text that was cut short is refused at once, whatever its length', () => {
    const { f8 } = toPortable(Float64Array.of(1, 2, 3)) as { f8: string };
    for (let length = 1; length < f8.length; length++) {
      expect(() => fromPortableLazily({ data: { f8: f8.slice(0, length) } })).toThrow('cut short');
    }
  });

  test('survives a message to a worker as plain data', () => {
    expect(structuredClone(fromPortableLazily(stored))).toEqual(fromPortable(stored));
  });
});
