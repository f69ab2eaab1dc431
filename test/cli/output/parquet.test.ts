import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { asyncBufferFromFile, parquetMetadataAsync, parquetReadObjects } from 'hyparquet';
import { parquetWriteFile } from 'hyparquet-writer';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { createParquet } from '../../../cli/output/parquet.ts';
import { openParquet } from '../../../cli/output/parquetReader.ts';
import { hashed } from '../engine/demo.ts';
import { readColumn } from '../readColumn.ts';

let home = '';
let path = '';
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), 'perilag-parquet-'));
  path = join(home, 'draws.parquet');
});
afterEach(() => rmSync(home, { recursive: true, force: true }));

const columns = [
  { name: 'orbit.eccentricity', unit: '1', label: 'Eccentricity' },
  { name: 'temperatureMax', unit: 'K', label: 'Maximum temperature' },
];

function write(groups: readonly (readonly Float64Array[])[], metadata: Record<string, string> = {}): void {
  const file = createParquet(path, columns);
  let from = 0;
  for (const group of groups) {
    file.append(from, group);
    from += group[0]!.length;
  }
  file.finish(metadata);
  file.close();
}

const numbers = (count: number, column: number) => Float64Array.from({ length: count }, (_, i) => hashed(1, i, column));
/** Bits, so that −0 is not 0. */
const bits = (values: Float64Array) => [...new BigUint64Array(values.buffer, values.byteOffset, values.length)];

describe('a Parquet file', () => {
  test('gives back every bit, a column at a time, over several groups', async () => {
    const odd = Float64Array.of(0, -0, 5e-324, -1.7976931348623157e308, Math.PI, 1 / 3, 273.15);
    write([
      [numbers(20000, 0), numbers(20000, 1)],
      [odd, odd.toReversed()],
    ]);
    expect(bits(await readColumn(path, 'orbit.eccentricity'))).toEqual([...bits(numbers(20000, 0)), ...bits(odd)]);
    expect(bits((await readColumn(path, 'temperatureMax')).slice(20000))).toEqual(bits(odd.toReversed()));
    expect(await readColumn(path, 'draw')).toEqual(Float64Array.from({ length: 20007 }, (_, i) => i));
  });

  test('what is not finite is null: few of them, many, all', async () => {
    const few = Float64Array.from({ length: 100 }, (_, i) => (i % 31 === 5 ? NaN : i / 7));
    const many = Float64Array.from({ length: 100 }, (_, i) =>
      i % 3 === 0 ? i / 7 : [NaN, Infinity, -Infinity][i % 3]!,
    );
    const none = new Float64Array(100).fill(NaN);
    write([
      [few, many],
      [none, few],
    ]);
    const rows = await parquetReadObjects({ file: await asyncBufferFromFile(path) });
    const expected = (values: Float64Array) => Array.from(values, (value) => (Number.isFinite(value) ? value : null));
    expect(rows.map((row) => row['orbit.eccentricity'])).toEqual([...expected(few), ...expected(none)]);
    expect(rows.map((row) => row.temperatureMax)).toEqual([...expected(many), ...expected(few)]);
    expect(rows.map(({ draw }) => draw)).toEqual(Array.from({ length: 200 }, (_, i) => BigInt(i)));
    const read = await readColumn(path, 'orbit.eccentricity');
    expect(read.subarray(0, 100)).toEqual(few);
    expect(read.subarray(100).every(Number.isNaN)).toBe(true);
    const half = await readColumn(path, 'temperatureMax');
    expect(half.subarray(0, 100)).toEqual(many.map((value) => (Number.isFinite(value) ? value : NaN)));
  });

  test('repeated numbers are packed, others not, and both read back', async () => {
    const same = new Float64Array(16384).fill(288.15);
    write([[same, numbers(16384, 1)]]);
    const { row_groups } = await parquetMetadataAsync(await asyncBufferFromFile(path));
    const [, first, second] = row_groups[0]!.columns.map(({ meta_data }) => meta_data!);
    expect(Number(first!.total_compressed_size)).toBeLessThan(0.1 * 8 * 16384);
    expect(second!.codec).toBe('UNCOMPRESSED');
    expect(await readColumn(path, 'orbit.eccentricity')).toEqual(same);
  });

  test('groups are as they were given, with the range of each column and its nulls', async () => {
    write([
      [Float64Array.of(3, NaN, -2), Float64Array.of(NaN, NaN, NaN)],
      [Float64Array.of(0, 0), Float64Array.of(1, 2)],
    ]);
    const { row_groups, num_rows, created_by } = await parquetMetadataAsync(await asyncBufferFromFile(path));
    expect(row_groups.map((group) => group.num_rows)).toEqual([3n, 2n]);
    expect({ num_rows, created_by }).toEqual({ num_rows: 5n, created_by: 'perilag' });
    const statistics = row_groups.map(({ columns: chunks }) => chunks.map(({ meta_data }) => meta_data!.statistics));
    expect(statistics[0]![1]).toMatchObject({ min_value: -2, max_value: 3, null_count: 1n });
    expect(statistics[0]![2]).toMatchObject({ null_count: 3n });
    expect(statistics[0]![2]!.min_value).toBeUndefined();
    expect(Object.is(statistics[1]![1]!.min_value, -0)).toBe(true); // as the format asks
  });

  test('says units, labels and what it was told', async () => {
    write([[Float64Array.of(1), Float64Array.of(2)]], { fingerprint: 'abc' });
    const table = await openParquet(path);
    expect(table.names).toEqual(['draw', 'orbit.eccentricity', 'temperatureMax']);
    expect(JSON.parse(table.metadata.units!)).toEqual({ 'orbit.eccentricity': '1', temperatureMax: 'K' });
    expect(JSON.parse(table.metadata.labels!).temperatureMax).toBe('Maximum temperature');
    expect(table.metadata.fingerprint).toBe('abc');
    await table.close();
  });

  test('another program’s file is read as well: whole numbers, doubles, nulls', async () => {
    parquetWriteFile({
      filename: path,
      rowGroupSize: 2,
      columnData: [
        { name: 'ecc', data: [0.1, null, 0.3], type: 'DOUBLE' },
        { name: 'chain', data: Int32Array.of(1, 2, 3), type: 'INT32' },
        { name: 'note', data: ['a', 'b', 'c'], type: 'STRING' },
      ],
    });
    expect(await readColumn(path, 'ecc')).toEqual(Float64Array.of(0.1, NaN, 0.3));
    expect(await readColumn(path, 'chain')).toEqual(Float64Array.of(1, 2, 3));
    await expect(readColumn(path, 'note')).rejects.toThrow('the column "note" does not hold numbers');
  });

  test('has the same bytes when written again', () => {
    const group = [numbers(5000, 0), new Float64Array(5000).fill(2)];
    write([group, group]);
    const first = readFileSync(path);
    write([group, group]);
    expect(readFileSync(path).equals(first)).toBe(true);
  });

  test('a column that is not there, a file that is not whole: told as the input’s fault', async () => {
    write([[Float64Array.of(1), Float64Array.of(2)]]);
    await expect(readColumn(path, 'lagOfMax')).rejects.toThrow(
      `${path}: there is no column "lagOfMax". Its columns are draw, orbit.eccentricity, temperatureMax.`,
    );
    writeFileSync(path, readFileSync(path).subarray(0, 200));
    await expect(readColumn(path, 'draw')).rejects.toThrow('this is not a whole Parquet file');
    await expect(readColumn(join(home, 'none'), 'draw')).rejects.toThrow('ENOENT');
  });
});
