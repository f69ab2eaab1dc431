import { openParquet } from '../../cli/output/parquetReader.ts';

/** One column of the file at `path`, NaN for null. Errors: as `openParquet` and `column`. */
export async function readColumn(path: string, name: string): Promise<Float64Array> {
  const table = await openParquet(path);
  try {
    return await table.column(name);
  } finally {
    await table.close();
  }
}
