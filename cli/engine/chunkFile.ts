/**
 * A chunk on disk: `PERILAG1`, the length of a header and a CRC-32 of all that follows (32 bits each), the header as JSON
 * padded to eight bytes, then the columns one after the other. Numbers are little-endian; they never leave for other programs.
 */
import { readFileSync } from 'node:fs';
import { crc32 } from 'node:zlib';
import { SimError } from '../../sim/error.ts';
import type { Failure, Range, Rows } from './job.ts';

const magic = 'PERILAG1';
const prefixBytes = 16;

interface Header extends Range {
  readonly columns: number;
  readonly failures: readonly Failure[];
}

/** The bytes of the file, in pieces. */
export function chunkPieces({ from, to, columns, failures }: Range & Rows): readonly Uint8Array[] {
  const header = headerBytes({ from, to, columns: columns.length, failures });
  const data = columns.map(({ buffer, byteOffset, byteLength }) => new Uint8Array(buffer, byteOffset, byteLength));
  const prefix = Buffer.alloc(prefixBytes);
  prefix.write(magic, 'latin1');
  prefix.writeUInt32LE(header.length, 8);
  prefix.writeUInt32LE(
    [header, ...data].reduce((crc, piece) => crc32(piece, crc), 0),
    12,
  );
  return [prefix, header, ...data];
}

function headerBytes(header: Header): Uint8Array {
  const text = Buffer.from(JSON.stringify(header));
  return Buffer.concat([text, Buffer.alloc((8 - (text.length % 8)) % 8, ' ')]);
}

/** Errors: SimError when it is not, to the last bit, a file that was written for these rows of a table of so many columns. */
export function readChunk(path: string, { from, to }: Range, columns: number): Rows {
  const bytes = readFileSync(path);
  const header = headerOf(bytes);
  if (header === null || header.from !== from || header.to !== to || header.columns !== columns)
    throw new SimError(
      path,
      'this file is damaged',
      'Remove it, and run again with --resume: its rows are computed anew',
    );
  const start = bytes.byteOffset + prefixBytes + bytes.readUInt32LE(8);
  const size = 8 * (to - from);
  const column = (index: number) =>
    new Float64Array(bytes.buffer.slice(start + size * index, start + size * (index + 1)));
  return { columns: Array.from({ length: columns }, (_, index) => column(index)), failures: header.failures };
}

/** Null unless the checksum holds. */
function headerOf(bytes: Buffer): Header | null {
  if (bytes.length < prefixBytes || bytes.toString('latin1', 0, 8) !== magic) return null;
  if (crc32(bytes.subarray(prefixBytes)) !== bytes.readUInt32LE(12)) return null;
  return JSON.parse(bytes.toString('utf8', prefixBytes, prefixBytes + bytes.readUInt32LE(8)));
}
