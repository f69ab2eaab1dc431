import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { type NetcdfFile, type NetcdfGroup, writeNetcdf } from '../../../cli/output/netcdf.ts';
import { SimError } from '../../../sim/error.ts';
import { requireTool, toolPath } from '../../support/require.ts';
import { bits, type FoundGroup, python, readNetcdf } from './readNetcdf.ts';

let home = '';
const at = (name: string) => join(home, name);
beforeEach(() => {
  home = mkdtempSync(join(tmpdir(), 'perilag-netcdf-'));
});
afterEach(() => rmSync(home, { recursive: true, force: true }));

const empty = { attributes: {}, dimensions: {}, variables: {}, groups: {} };
const awkward = [-0, 1 / 3, Number.MIN_VALUE, -Number.MAX_VALUE, 2 ** 53 + 2, 1e-310];

/** Numbers whose last bits matter; `awkward` ones among them. */
const values = (length: number, seed = 0) =>
  Float64Array.from({ length }, (_, i) => (i < awkward.length ? awkward[i]! : 280 + Math.sin(i * 0.37 + seed) / 3));

function globe(samples: number, bands: number): NetcdfGroup {
  return {
    attributes: { case: 'thick air', number: 0.1 },
    dimensions: { time: samples, latitude: bands, bound: 2 },
    variables: {
      temperature: {
        data: values(samples * bands),
        dims: ['time', 'latitude'],
        attributes: { units: 'K', coordinates: 'season' },
      },
      time: { data: values(samples), dims: ['time'], attributes: { units: 's', axis: 'T' } },
      latitude: {
        data: values(bands),
        dims: ['latitude'],
        attributes: { units: 'degrees_north', bounds: 'latitude_bounds' },
      },
      latitude_bounds: { data: values(2 * bands), dims: ['latitude', 'bound'], attributes: {} },
      season: { data: values(samples, 1), dims: ['time'], attributes: { units: 'degree' } },
      mean: { data: Float64Array.of(1 / 7), dims: [], attributes: { units: 'K' } },
    },
    groups: {},
  };
}

const twoGlobes: NetcdfFile = {
  ...empty,
  attributes: { Conventions: 'CF-1.11', title: 'Corvane b: ±5 °, “warm”', empty: '', lines: 'a: 1\nb: 2\n' },
  groups: { thick_air: { ...empty, groups: { warm: globe(365, 90), cold: globe(12, 18) } } },
};

/** Every group, dimension, attribute and number, and nothing else. */
function expectSame(found: FoundGroup, { attributes, dimensions, variables, groups }: NetcdfGroup): void {
  expect(found.attributes).toEqual(attributes);
  expect(found.dimensions).toEqual(dimensions);
  expect(Object.keys(found.variables).sort()).toEqual(Object.keys(variables).sort());
  for (const [name, { data, dims, attributes: own }] of Object.entries(variables)) {
    expect(found.variables[name]).toMatchObject({ dims, dtype: 'float64', attributes: own });
    expect(found.variables[name]!.data === bits(data), `${name} bit for bit`).toBe(true);
  }
  expect(Object.keys(found.groups)).toEqual(Object.keys(groups));
  for (const [name, inner] of Object.entries(groups)) expectSame(found.groups[name]!, inner);
}

describe.skipIf(!requireTool('xarray'))('read back by netCDF4-python and xarray', () => {
  test('groups, dimensions, attributes and numbers, bit for bit', async () => {
    await writeNetcdf(at('a.nc'), twoGlobes);
    const { format, netcdf4, xarray } = readNetcdf(at('a.nc'));
    expect(format).toBe('NETCDF4');
    expectSame(netcdf4, twoGlobes);
    const { warm } = twoGlobes.groups.thick_air!.groups;
    const opened = xarray['thick_air/warm']!;
    expect(Object.keys(opened.variables).sort()).toEqual(Object.keys(warm!.variables).sort());
    for (const [name, { data, dims }] of Object.entries(warm!.variables)) {
      expect(opened.variables[name]).toEqual({ dims, data: bits(data) });
    }
    expect(opened.coordinates).toEqual(['latitude', 'season', 'time']);
  });

  test('a field of several chunks: compressed, written one after the other, same bits', async () => {
    const shapes = { long: [1000, 300], flat: [1, 200_000], deep: [7, 40, 1000] };
    const groups = Object.entries(shapes).map(([name, shape]) => {
      const dims = ['x', 'y', 'z'].slice(0, shape.length);
      const data = values(shape.reduce((a, b) => a * b));
      const dimensions = Object.fromEntries(dims.map((dim, i) => [dim, shape[i]!]));
      return [
        name,
        { ...empty, dimensions, variables: { field: { data, dims, attributes: { units: 'K' } } } },
      ] as const;
    });
    const file = { ...empty, groups: Object.fromEntries(groups) };
    const checkpoint = vi.fn();
    await writeNetcdf(at('a.nc'), file, checkpoint);
    const { netcdf4 } = readNetcdf(at('a.nc'));
    expectSame(netcdf4, file);
    // 131 072 values a chunk: 436 rows of 300, one row of 200 000, three rows of 40 000.
    const storage = (name: string) => netcdf4.groups[name]!.variables.field!;
    expect([storage('long').chunks, storage('long').gzip]).toEqual([[436, 300], 4]);
    expect(storage('flat').chunks).toEqual([1, 200_000]);
    expect(storage('deep').chunks).toEqual([3, 40, 1000]);
    expect(checkpoint).toHaveBeenCalledTimes(2 + 0 + 2);
  });

  test('an attribute longer than 64 kB', async () => {
    const scenario = 'latitude: 1.5 deg # ±\n'.repeat(20_000);
    await writeNetcdf(at('a.nc'), { ...empty, attributes: { scenario } });
    expect(readNetcdf(at('a.nc')).netcdf4.attributes.scenario === scenario).toBe(true);
  });

  test('netCDF4-python can add to the file: a variable, a dimension, a group, a changed attribute', async () => {
    await writeNetcdf(at('a.nc'), twoGlobes);
    python(
      at('a.nc'),
      `
with netCDF4.Dataset(path, 'a') as root:
    group = root['thick_air/warm']
    celsius = group.createVariable('celsius', 'f8', ('time', 'latitude'))
    celsius[:] = group['temperature'][:] - 273.15
    celsius.units = 'degC'
    root.title = 'mine'
    root.createDimension('n', 3)
    root.createGroup('other').note = 'more'
`,
    );
    const { netcdf4 } = readNetcdf(at('a.nc'));
    const { warm } = twoGlobes.groups.thick_air!.groups;
    const expected = warm!.variables.temperature!.data.map((kelvin) => kelvin - 273.15);
    const found = netcdf4.groups.thick_air!.groups.warm!.variables;
    expect(found.celsius!.data === bits(expected)).toBe(true);
    expect(found.temperature!.data === bits(warm!.variables.temperature!.data)).toBe(true);
    expect(netcdf4).toMatchObject({ dimensions: { n: 3 }, attributes: { title: 'mine' }, groups: { other: {} } });
  });

  test('a failed file does not spoil the next', async () => {
    const stop = () => {
      throw new Error('stopped');
    };
    const big = { ...empty, dimensions: { x: 1000, y: 300 } };
    const field = { field: { data: values(300_000), dims: ['x', 'y'], attributes: {} } };
    await expect(writeNetcdf(at('a.nc'), { ...big, variables: field }, stop)).rejects.toThrow('stopped');
    expect(readdirSync(home)).toEqual([]);
    await writeNetcdf(at('a.nc'), twoGlobes);
    expectSame(readNetcdf(at('a.nc')).netcdf4, twoGlobes);
  });
});

describe.skipIf(!requireTool('ncdump'))('ncdump', () => {
  test('tells NetCDF-4 and prints a header that reads well', async () => {
    await writeNetcdf(at('a.nc'), { ...empty, attributes: { title: 'Corvane b' }, groups: { base: globe(365, 90) } });
    const ncdump = (option: string) => execFileSync(toolPath('ncdump')!, [option, at('a.nc')], { encoding: 'utf8' });
    expect(ncdump('-k')).toBe('netCDF-4\n');
    expect(ncdump('-h').replaceAll('\t', '  ')).toBe(`netcdf a {

// global attributes:
    :title = "Corvane b" ;

group: base {
  dimensions:
    time = 365 ;
    latitude = 90 ;
    bound = 2 ;
  variables:
    double time(time) ;
      time:units = "s" ;
      time:axis = "T" ;
    double latitude(latitude) ;
      latitude:units = "degrees_north" ;
      latitude:bounds = "latitude_bounds" ;
    double temperature(time, latitude) ;
      temperature:units = "K" ;
      temperature:coordinates = "season" ;
    double latitude_bounds(latitude, bound) ;
    double season(time) ;
      season:units = "degree" ;
    double mean ;
      mean:units = "K" ;

  // group attributes:
      :case = "thick air" ;
      :number = 0.1 ;
  } // group base
}
`);
  });
});

describe('writeNetcdf', () => {
  test('the same input gives the same bytes at any time; the clock is as it was', async () => {
    await writeNetcdf(at('a.nc'), twoGlobes);
    const clock = vi.spyOn(Date, 'now').mockReturnValue(Date.UTC(2031, 4, 1));
    await writeNetcdf(at('b.nc'), twoGlobes);
    expect(Date.now()).toBe(Date.UTC(2031, 4, 1));
    clock.mockRestore();
    expect(readFileSync(at('a.nc')).equals(readFileSync(at('b.nc')))).toBe(true);
  });

  test.each([Number.NaN, Number.POSITIVE_INFINITY])(
    '%d is refused by the variable’s name; nothing is written',
    async (value) => {
      const data = Float64Array.of(1, 2, value, 4);
      const variables = { albedo: { data, dims: ['latitude'], attributes: {} } };
      const inner = { ...empty, dimensions: { latitude: 4 }, variables };
      const written = writeNetcdf(at('a.nc'), { ...empty, groups: { base: inner } });
      await expect(written).rejects.toThrow(`base/albedo at index 2: ${value} is not a result`);
      await expect(written).rejects.not.toBeInstanceOf(SimError); // our fault: exit 1
      expect(readdirSync(home)).toEqual([]);
    },
  );

  test.each([
    ['too few values', { dims: ['x'], data: new Float64Array(3) }, 'base/v: 3 values on [x]'],
    ['no such dimension', { dims: ['z'], data: new Float64Array(4) }, 'base/v: 4 values on [z]'],
    [
      'a coordinate on two dimensions',
      { name: 'x', dims: ['x', 'x'], data: new Float64Array(16) },
      'base/x: a coordinate',
    ],
    [
      'a name with a slash',
      { name: 'v/w', dims: ['x'], data: new Float64Array(4) },
      'base/: "v/w" is not a plain name',
    ],
    [
      'a name that is a number',
      { name: '7', dims: ['x'], data: new Float64Array(4) },
      'base/: "7" is not a plain name',
    ],
  ])(
    'a mistake of the caller is told: %s',
    async (_, { name = 'v', ...variable }: { name?: string; dims: string[]; data: Float64Array }, message) => {
      const inner = { ...empty, dimensions: { x: 4 }, variables: { [name]: { ...variable, attributes: {} } } };
      await expect(writeNetcdf(at('a.nc'), { ...empty, groups: { base: inner } })).rejects.toThrow(message);
      expect(readdirSync(home)).toEqual([]);
    },
  );

  test('a path that cannot be written is an error of the input that leaves what is there alone', async () => {
    writeFileSync(at('plain'), 'precious');
    const told = async (path: string, reason: string) => {
      const written = writeNetcdf(path, twoGlobes);
      await expect(written).rejects.toThrow(
        `${path}: this file cannot be written: ${reason}. Choose another folder with -o.`,
      );
      await expect(written).rejects.toBeInstanceOf(SimError);
    };
    await told(at('plain'), 'file already exists');
    await told(join(at('plain'), 'a.nc'), 'not a directory');
    await told(join(at('nowhere'), 'a.nc'), 'no such file or directory');
    expect(readdirSync(home)).toEqual(['plain']);
    expect(readFileSync(at('plain'), 'utf8')).toBe('precious');
  });

  test('a disk that fills up half-way: the reason, and no half file', () => {
    const child = fileURLToPath(new URL('writeTooMuch.ts', import.meta.url));
    const { stdout, stderr } = spawnSync(
      'bash',
      ['-c', 'ulimit -f 500; exec "$0" --import tsx "$1" "$2"', process.execPath, child, at('a.nc')],
      { encoding: 'utf8' },
    );
    expect(`${stdout}${stderr}`).toBe(
      `SimError: ${at('a.nc')}: this file cannot be written: File too large. Choose another folder with -o.\n`,
    );
    expect(existsSync(at('a.nc'))).toBe(false);
  });
});
