import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { cfUnit } from '../../../cli/output/cfUnit.ts';
import { fieldsFile, hasFields } from '../../../cli/output/fields.ts';
import { writeFolder } from '../../../cli/output/folder.ts';
import { groupNames } from '../../../cli/output/groupNames.ts';
import { type NetcdfFile, writeNetcdf } from '../../../cli/output/netcdf.ts';
import type { RunResult } from '../../../sim/run.ts';
import type { Scenario } from '../../../sim/scenario/types.ts';
import { requireTool } from '../../support/require.ts';
import { fixtureResult } from '../fixture.ts';
import { bits, python, readNetcdf } from './readNetcdf.ts';
import { zonalDataset } from './zonalDataset.ts';

const bands = 90;
const samples = 365;
const shallow = { bands, samples, periodDays: 132.1, mean: 280 };
const history = '2026-12-01T07:50:00Z: perilag run corvane.yaml';
const asUnderstood = 'title: Corvane b\nplanet: { bondAlbedo: 0.3 } # ±\n';

/** Two cases of unlike shape; the first has two states. */
function zonalResult(): RunResult {
  const states = [
    { label: 'warm', stable: true, offset: 0 },
    { label: 'cold', stable: false, offset: 0 },
  ];
  const result = fixtureResult([
    { name: 'Shallow sea, ±5 m', states, warnings: ['First caution.', 'Second caution.'] },
    { name: '5 bar' },
  ]);
  const shapes = [[shallow, { ...shallow, mean: 210 }], [{ ...shallow, bands: 18, samples: 12, periodDays: 365.2 }]];
  const cases = result.cases.map((item, i) => {
    const withFields = item.states.map((state, j) => ({ ...state, dataset: zonalDataset(shapes[i]![j]!) }));
    return { ...item, model: 'zonal', states: withFields };
  });
  return { ...result, cases };
}

/** Only what the fields need of a scenario; the first case has a date. */
function zonalScenario(periapsisTime: number | null): Scenario {
  const cases = [periapsisTime, null].map((time) => ({ world: { orbit: { periapsisTime: time } } }));
  return { cases } as unknown as Scenario;
}

const zonalFile = (periapsisTime: number | null = null) =>
  fieldsFile(zonalResult(), zonalScenario(periapsisTime), asUnderstood, history);
const warmOf = (file: NetcdfFile) => file.groups.Shallow_sea_5_m!.groups.warm!;

describe('fieldsFile', () => {
  test('a group for each state of each case, listed in the file; where it comes from', () => {
    const { attributes, groups } = zonalFile();
    expect(attributes).toEqual({
      Conventions: 'CF-1.11',
      title: 'Corvane b under three ground assumptions',
      history,
      source: 'perilag 9.8.7',
      groups: 'Shallow_sea_5_m/warm Shallow_sea_5_m/cold case_5_bar/only',
      scenario: asUnderstood,
    });
    expect(groups.Shallow_sea_5_m!.groups.cold!.attributes).toEqual({
      case: 'Shallow sea, ±5 m',
      state: 'cold',
      stable: 'false',
      model: 'zonal',
      comment: 'First caution.\nSecond caution.',
    });
    expect(groups.case_5_bar!.groups.only!.dimensions).toEqual({ time: 12, latitude: 18, edge: 2 });
  });

  test('coordinates in degrees, with edges and the season beside them', () => {
    const { variables } = warmOf(zonalFile());
    expect(variables.latitude!.attributes).toEqual({
      long_name: 'Latitude',
      units: 'degrees_north',
      standard_name: 'latitude',
      axis: 'Y',
      bounds: 'latitude_bounds',
    });
    expect(variables.latitude_bounds!.attributes).toEqual({});
    const edges = variables.latitude_bounds!.data;
    expect([edges[0], edges[1], edges.at(-1)]).toEqual([-90, (Math.asin(-1 + 2 / bands) * 180) / Math.PI, 90]);
    expect(edges[2 * 60]).toBeCloseTo(19.471220634490695, 12); // asin ⅓, where two thirds of the area lie to the south
    expect(edges[2 * 60 - 1]).toBe(edges[2 * 60]); // the band below ends where this one begins
    expect(variables.solar_longitude!.attributes).toEqual({ long_name: 'Solar longitude', units: 'degree' });
    expect(variables.solar_longitude!.data[73]).toBeCloseTo(72, 12);
  });

  test('fields: names, units, standard names, and what a value stands for', () => {
    const { variables } = warmOf(zonalFile());
    const shared = { coordinates: 'solar_longitude' };
    expect(variables.band_land_temperature!.attributes).toEqual({
      long_name: 'Temperature of the land',
      units: 'K',
      standard_name: 'surface_temperature',
      cell_methods: 'time: point area: mean where land',
      ...shared,
    });
    expect(variables.band_sea_temperature!.attributes).toMatchObject({
      cell_methods: 'time: point area: mean where sea',
    });
    expect(variables.band_insolation!.attributes).toEqual({
      long_name: 'Daily-mean insolation',
      units: 'W m-2',
      standard_name: 'toa_incoming_shortwave_flux',
      cell_methods: 'time: point area: mean',
      ...shared,
    });
    expect(variables.band_albedo!.attributes).toMatchObject({ units: '1', standard_name: 'planetary_albedo' });
    expect(variables.land_fraction!.attributes).toEqual({
      long_name: 'Share of land',
      units: '1',
      standard_name: 'land_area_fraction',
      cell_methods: 'area: mean',
    });
    expect(variables.temperature!.attributes).toEqual({
      long_name: 'Mean temperature',
      units: 'K',
      standard_name: 'surface_temperature',
      cell_methods: 'time: point area: mean',
    });
    expect(variables.instellation!.attributes).toEqual({ long_name: 'Instellation', units: 'W m-2' });
  });

  test('time: elapsed without a date; from the periapsis where that is dated; never for a forward run', () => {
    const elapsed = { long_name: 'Time after periapsis', units: 's', axis: 'T' };
    expect(warmOf(zonalFile()).variables.time!.attributes).toEqual(elapsed);
    // JD 2461103.5 is 2026-03-04 0 h (Python: date(2026, 3, 4).toordinal() + 1721424.5); 0.21 d is 5:02:24.
    const seconds = (2_461_103.71 - 2_451_545) * 86_400;
    expect(warmOf(zonalFile(seconds)).variables.time!.attributes).toMatchObject({
      standard_name: 'time',
      units: 'seconds since 2026-03-04 05:02:24.000',
      calendar: 'proleptic_gregorian',
    });
    const beyond = 9000 * 365.25 * 86_400;
    expect(warmOf(zonalFile(beyond)).variables.time!.attributes).toEqual(elapsed);
    const result = zonalResult();
    const forward = result.cases.map((item) => ({ ...item, states: [{ ...item.states[0]!, label: 'forward' }] }));
    const file = fieldsFile({ ...result, cases: forward }, zonalScenario(seconds), asUnderstood, history);
    expect(file.groups.Shallow_sea_5_m!.groups.forward!.variables.time!.attributes).toEqual(elapsed);
  });

  test('a run without latitude has no fields', () => {
    expect(hasFields(zonalResult())).toBe(true);
    expect(hasFields(fixtureResult())).toBe(false);
  });
});

describe('the parts', () => {
  test.each([
    ['W/m2', 'W m-2'],
    ['W/m2/K', 'W m-2 K-1'],
    ['J/m2/K', 'J m-2 K-1'],
    ['K/s', 'K s-1'],
    ['1/s', 's-1'],
    ['1', '1'],
    ['m', 'm'],
  ])('cfUnit: %s is %s', (ours, text) => {
    expect(cfUnit(ours)).toEqual({ text, size: 1 });
  });

  test('cfUnit: an angle in degrees; a unit that UDUNITS cannot spell is a mistake', () => {
    expect(cfUnit('rad')).toEqual({ text: 'degree', size: Math.PI / 180 });
    expect(() => cfUnit('J/m2/K/s^0.5')).toThrow('J/m2/K/s^0.5 has no spelling in UDUNITS here');
  });

  test('groupNames: plain, all different', () => {
    const names = ['shallow sea', 'Größe é', '5 bar', '海', '陸', 'shallow-sea', 'shallow sea 2', '  '];
    expect(groupNames(names)).toEqual([
      'shallow_sea',
      'Gro_e_e',
      'case_5_bar',
      'case',
      'case_2',
      'shallow_sea_2',
      'shallow_sea_2_2',
      'case_3',
    ]);
  });
});

describe.skipIf(!requireTool('xarray'))('fields.nc, read back', () => {
  let home = '';
  const path = () => join(home, 'fields.nc');
  beforeEach(() => {
    home = mkdtempSync(join(tmpdir(), 'perilag-fields-'));
  });
  afterEach(() => rmSync(home, { recursive: true, force: true }));

  test('from the output folder: every group opens in xarray with its coordinates; same bits', async () => {
    const file = zonalFile(825_000_000.5);
    await writeFolder(home, [
      { name: 'summary.json', pieces: ['{}'] },
      { name: 'fields.nc', write: (to, checkpoint) => writeNetcdf(to, file, checkpoint) },
    ]);
    expect(readdirSync(home).sort()).toEqual(['fields.nc', 'summary.json']);
    const { netcdf4, xarray } = readNetcdf(path());
    expect(Object.keys(xarray).sort()).toEqual(
      ['', 'Shallow_sea_5_m', 'case_5_bar', ...String(netcdf4.attributes.groups).split(' ')].sort(),
    );
    const { band_land_temperature, latitude } = warmOf(file).variables;
    const warm = xarray['Shallow_sea_5_m/warm']!;
    expect(warm.variables.band_land_temperature).toEqual({
      dims: ['time', 'latitude'],
      data: bits(band_land_temperature!.data),
    });
    expect(warm.variables.latitude).toEqual({ dims: ['latitude'], data: bits(latitude!.data) });
    expect(warm.coordinates).toEqual(['latitude', 'solar_longitude', 'time']);
    // Python: datetime(2000, 1, 1, 12) + timedelta(seconds=825000000.5), and 132.1 d / 365 later.
    expect(warm.times[0]).toBe('2026-02-22T02:40:00.500000000');
    expect(warm.times[1]).toMatch(/^2026-02-22T11:21:10\.1986/);
    expect(Number(xarray['case_5_bar/only']!.times[0])).toBe(0);
  });

  test('a user’s first lines give what they should', async () => {
    await writeNetcdf(path(), zonalFile());
    const printed = python(
      path(),
      `
root = xarray.open_dataset(path)
data = xarray.open_dataset(path, group=root.attrs['groups'].split()[0])
print(round(float(data.band_land_temperature.sel(latitude=45, method='nearest').max()), 1), data.band_land_temperature.units)
print(data.latitude.attrs['bounds'], data[data.latitude.attrs['bounds']].dims)
print(float(numpy.sin(numpy.radians(data.latitude_bounds)).diff('edge').std()) < 1e-15)
`,
    ).split('\n');
    // 280 + 25 cos 2φ + 40 sin φ at the band nearest to 45°, at the day nearest to the height of the season.
    const sine = -1 + (2 * 76 + 1) / bands;
    expect(printed).toEqual([
      `${(280 + 25 * (1 - 2 * sine ** 2) + 40 * sine).toFixed(1)} K`,
      "latitude_bounds ('latitude', 'edge')",
      'True',
    ]);
  });

  test('why no calendar "none": xarray refuses to decode it', async () => {
    const time = { data: Float64Array.of(0, 1), dims: ['time'] };
    const attributes = { units: 'seconds since 0001-01-01', calendar: 'none' };
    await writeNetcdf(path(), {
      ...{ attributes: {}, groups: {}, dimensions: { time: 2 } },
      variables: { time: { ...time, attributes } },
    });
    expect(() => python(path(), 'xarray.open_dataset(path)')).toThrow('unable to decode time units');
  });
});
