/**
 * Results as JSON and back, number for number: a Float64Array becomes `{ f8: base64 of its little-endian bytes }`.
 * Small, quick to read, and the same in Node, a browser and a worker. NaN and infinities have no place in a result
 * and are refused. Fields of many numbers go in single precision, `{ f4: … }`: they are looked at here, and stand in full in
 * their own file.
 */
import { notAResult, SimError } from '../error.ts';

/** What stands for a Float64Array in JSON. */
type PortableArray = { readonly f8: string } | { readonly f4: string };

/** Arrays longer than this are stored in single precision. */
export const longestExact = 8192;

/** RFC 4648 base64 of a string with a byte in each letter, and back: in Node, browsers and workers alike. */
declare function btoa(binary: string): string;
declare function atob(base64: string): string;

const isLittleEndian = new Uint8Array(Uint16Array.of(1).buffer)[0] === 1;

/**
 * A copy of `value` that JSON can hold; anything but typed arrays, plain objects, arrays and primitives is refused.
 * Errors: one that names the path of a number that is not finite; SimError for what cannot be stored.
 */
export function toPortable(value: unknown, path = 'result'): unknown {
  if (value instanceof Float64Array) return encode(value, path);
  if (typeof value === 'number' && !Number.isFinite(value)) throw notAResult(path, value);
  if (typeof value === 'function') throw new SimError(path, 'a function cannot be stored', 'Keep results plain data');
  if (value === null || typeof value !== 'object') return value;
  if (Array.isArray(value)) return value.map((item, index) => toPortable(item, `${path}.${index}`));
  if (isPortableArray(value))
    throw new SimError(path, 'this would be read back as numbers', 'Choose another key than f8 or f4');
  return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, toPortable(item, `${path}.${key}`)]));
}

/** What `toPortable` was given. The caller knows the type. */
export function fromPortable<T>(value: unknown): T {
  return restore(value) as T;
}

/** The same, but an array that stands in an object is decoded when it is first read: for pages that show a part of a large result. */
export function fromPortableLazily<T>(value: unknown): T {
  return restoreLazily(value) as T;
}

function restoreLazily(value: unknown): unknown {
  if (value === null || typeof value !== 'object') return value;
  if (Array.isArray(value)) return value.map(restoreLazily);
  if (isPortableArray(value)) return decode(value);
  const restored = {};
  for (const [key, item] of Object.entries(value)) {
    Object.defineProperty(restored, key, {
      enumerable: true,
      ...(isStoredArray(item) ? whenRead(item) : { value: restoreLazily(item) }),
    });
  }
  return restored;
}

function isStoredArray(value: unknown): value is PortableArray {
  return value !== null && typeof value === 'object' && isPortableArray(value);
}

function whenRead(stored: PortableArray): { get(): Float64Array } {
  const text = 'f8' in stored ? stored.f8 : stored.f4;
  const padding = text.endsWith('==') ? 2 : Number(text.endsWith('='));
  requireWhole((text.length / 4) * 3 - padding, 'f8' in stored ? 8 : 4);
  let decoded: Float64Array | null = null;
  return {
    get() {
      decoded ??= decode(stored);
      return decoded;
    },
  };
}

function restore(value: unknown): unknown {
  if (value === null || typeof value !== 'object') return value;
  if (Array.isArray(value)) return value.map(restore);
  if (isPortableArray(value)) return decode(value);
  return Object.fromEntries(Object.entries(value).map(([key, item]) => [key, restore(item)]));
}

function isPortableArray(value: object): value is PortableArray {
  const stored = 'f8' in value ? value.f8 : 'f4' in value ? value.f4 : null;
  return typeof stored === 'string' && Object.keys(value).length === 1;
}

function encode(data: Float64Array, path: string): PortableArray {
  for (let at = 0; at < data.length; at++) {
    if (!Number.isFinite(data[at])) throw notAResult(`${path}.${at}`, data[at]!);
  }
  return data.length > longestExact
    ? { f4: btoa(binaryText(singleBytes(data))) }
    : { f8: btoa(binaryText(littleEndianBytes(data))) };
}

function decode(stored: PortableArray): Float64Array {
  if ('f4' in stored) return singles(bytesOf(stored.f4, 4));
  const bytes = bytesOf(stored.f8, 8);
  return isLittleEndian ? new Float64Array(bytes.buffer) : swapped(new Float64Array(bytes.buffer));
}

function singleBytes(data: Float64Array): Uint8Array {
  const bytes = new Uint8Array(4 * data.length);
  const view = new DataView(bytes.buffer);
  for (let at = 0; at < data.length; at++) view.setFloat32(4 * at, data[at], true);
  return bytes;
}

function singles(bytes: Uint8Array<ArrayBuffer>): Float64Array {
  const view = new DataView(bytes.buffer);
  return Float64Array.from({ length: bytes.length / 4 }, (_, at) => view.getFloat32(4 * at, true));
}

function littleEndianBytes(data: Float64Array): Uint8Array {
  const ordered = isLittleEndian ? data : swapped(data);
  return new Uint8Array(ordered.buffer, ordered.byteOffset, ordered.byteLength);
}

/** A copy with the bytes of each number the other way round. */
function swapped(data: Float64Array): Float64Array {
  const copy = data.slice();
  const view = new DataView(copy.buffer);
  for (let at = 0; at < copy.byteLength; at += 8) view.setFloat64(at, view.getFloat64(at, true), false);
  return copy;
}

/** A letter for each byte, in pieces that fit a call's arguments. */
function binaryText(bytes: Uint8Array): string {
  const pieces: string[] = [];
  for (let from = 0; from < bytes.length; from += 8192) {
    pieces.push(Reflect.apply(String.fromCharCode, null, bytes.subarray(from, from + 8192)));
  }
  return pieces.join('');
}

function bytesOf(base64: string, each: 4 | 8): Uint8Array<ArrayBuffer> {
  const binary = atob(base64);
  requireWhole(binary.length, each);
  const bytes = new Uint8Array(binary.length);
  for (let at = 0; at < bytes.length; at++) bytes[at] = binary.charCodeAt(at);
  return bytes;
}

function requireWhole(bytes: number, each: 4 | 8): void {
  if (bytes % each !== 0) throw new SimError(`f${each}`, 'the stored numbers are cut short', 'Make the file anew');
}
