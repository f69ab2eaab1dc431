import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { loadHdf5 } from '../../../cli/output/hdf5.ts';
import { writeNetcdf } from '../../../cli/output/netcdf.ts';

test('a field of 200 MB is written within a quarter of its size beside it', async () => {
  const [samples, bands] = [17_361, 1440];
  const data = Float64Array.from(
    { length: samples * bands },
    (_, i) => 280 + 20 * Math.cos((i % bands) / 30) + Math.sin(i / 7e4),
  );
  const variables = { temperature: { data, dims: ['time', 'latitude'], attributes: { units: 'K' } } };
  const home = mkdtempSync(join(tmpdir(), 'perilag-netcdf-'));
  try {
    await loadHdf5();
    const before = process.memoryUsage.rss();
    let most = before;
    const watch = () => {
      most = Math.max(most, process.memoryUsage.rss());
    };
    const dimensions = { time: samples, latitude: bands };
    await writeNetcdf(join(home, 'a.nc'), { attributes: {}, dimensions, variables, groups: {} }, watch);
    expect(most).toBeGreaterThan(data.byteLength); // the field itself was counted
    expect(most - before).toBeLessThan(data.byteLength / 4); // about 25 MB were seen
  } finally {
    rmSync(home, { recursive: true, force: true });
  }
});
