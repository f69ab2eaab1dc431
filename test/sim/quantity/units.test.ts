import { describe, expect, test } from 'vitest';
import { SimError } from '../../../sim/error.ts';
import { dimensions, fromUnit, inUnit, parseUnit } from '../../../sim/quantity/index.ts';
import { unitTable } from '../../../sim/quantity/unitTable.ts';

/** Symbol → one of it in SI, with the source. Written out here, not taken from the constants, so that a slip there shows. */
const published: Record<string, number> = {
  // SI Brochure 9th ed. (2019), tables 7 and 8 and the prefixes: exact
  '1': 1,
  '%': 0.01,
  ppm: 1e-6,
  m: 1,
  km: 1000,
  cm: 0.01,
  mm: 0.001,
  um: 1e-6,
  nm: 1e-9,
  kg: 1,
  g: 0.001,
  W: 1,
  mW: 0.001,
  kW: 1000,
  J: 1,
  kJ: 1000,
  MJ: 1e6,
  K: 1,
  degC: 274.15,
  rad: 1,
  s: 1,
  min: 60,
  h: 3600,
  d: 86400,
  Pa: 1,
  hPa: 100,
  kPa: 1000,
  MPa: 1e6,
  mbar: 100,
  bar: 1e5,
  tiu: 1,
  deg: 0.017453292519943295,
  arcmin: 2.908882086657216e-4,
  arcsec: 4.84813681109536e-6,
  mas: 4.84813681109536e-9,
  au: 149597870700, // IAU 2012 Resolution B2, exact
  yr: 31557600, // IAU style manual: the Julian year of 365.25 d, exact
  atm: 101325, // 10th CGPM (1954) Resolution 4, exact
  // IAU 2015 Resolution B3 (Prša et al. 2016, AJ 152, 41), nominal values, exact
  Rsun: 6.957e8,
  Rearth: 6.3781e6,
  Rjup: 7.1492e7,
  Lsun: 3.828e26,
  S0: 1361,
  // GM of that resolution over CODATA 2018 G, as astropy.constants prints them (from memory)
  Msun: 1.988409870698051e30,
  Mearth: 5.972167867791379e24,
  Mjup: 1.8981245973360505e27,
};

describe('table units', () => {
  test('every one has a published value and every value a unit', () => {
    expect(unitTable.map(({ symbol }) => symbol).sort()).toEqual(Object.keys(published).sort());
  });

  // One rounding in the product and one in the quotient: 4 units in the last place leave no room for another value.
  test.each(Object.entries(published))('%s', (symbol, si) => {
    expect(Math.abs(fromUnit(1, symbol) / si - 1)).toBeLessThan(1e-15);
    expect(inUnit(si, symbol)).toBeCloseTo(1, 12);
  });

  test('no spelling stands for two units', () => {
    const names = unitTable.flatMap(({ symbol, aliases }) => [symbol, ...aliases]);
    expect(new Set(names).size).toBe(names.length);
  });

  test('decimal fractions are exact', () => {
    expect(fromUnit(35, '%')).toBe(0.35);
    expect(fromUnit(0.55, 'um')).toBe(0.55e-6);
    expect(fromUnit(5.51, 'g/cm3')).toBe(5510);
    expect(fromUnit(180, 'deg')).toBe(Math.PI);
  });

  test('the units offered for a dimension have that dimension', () => {
    for (const { exponents, units } of Object.values(dimensions)) {
      for (const unit of units) expect(parseUnit(unit).dimension).toEqual(exponents);
    }
  });
});

describe('spellings', () => {
  const same: [normal: string, ...spellings: string[]][] = [
    [
      'W/m2',
      'W m-2',
      'W/m^2',
      'W m⁻²',
      'W m^-2',
      'W·m^-2',
      'W⋅m⁻²',
      'W*m-2',
      'W / m2',
      'W m**-2',
      'W/m²',
      'W m^(-2)',
      'm-2 W',
      ' W  m-2 ',
    ],
    [
      'J/m2/K/s^0.5',
      'J m-2 K-1 s-1/2',
      'J m-2 K-1 s^-0.5',
      'J m⁻² K⁻¹ s⁻¹ᐟ²',
      'J m⁻² K⁻¹ s⁻½',
      'J m^-2 K^-1 s^(-1/2)',
      'J/(m2 K s^0.5)',
      'J/(m²·K·s^½)',
      'J/m2/K/s^1/2',
      'J m−2 K−1 s−0.5',
    ],
    ['J/m2/K', 'J m-2 K-1', 'J/(m2 K)', 'J/m²/K', 'J K-1 m-2'],
    ['J/kg/K', 'J kg-1 K-1', 'J/(kg*K)'],
    ['kg/m3', 'kg m-3', 'kg m⁻³'],
    ['km/s', 'km s-1', 'km s⁻¹'],
    ['1/s', 's-1', 's^-1'],
    ['Rearth', 'R_earth', 'R⊕', 'R_⊕'],
    ['Lsun', 'lsun', 'LSUN', 'l_sun'],
    ['Mjup', 'mjup', 'MJUP'],
    ['Mearth', 'mearth', 'MEarth'],
    ['au', 'AU', 'A.U.', 'a.u.'],
    ['Rsun', 'R_sun', 'rsun', 'RSun', 'R☉', 'R⊙', 'R_☉'],
    ['Rjup', 'RJup', 'R_jup', 'R_J'],
    ['Mearth', 'M_earth', 'M⊕'],
    ['Msun', 'M_sun', 'M☉', 'M⊙'],
    ['Mjup', 'MJup', 'M_Jup', 'M_J'],
    ['Lsun', 'L_sun', 'L☉', 'L⊙'],
    ['S0', 'S⊕', 'S_earth'],
    ['degC', '°C'],
    ['deg', '°', 'degree', 'degrees'],
    ['um', 'µm', 'μm'],
    ['au', 'AU'],
    ['d', 'day', 'days'],
    ['h', 'hr', 'hour', 'hours'],
    ['yr', 'year', 'years'],
    ['tiu', 'TIU'],
  ];
  test.each(same)('%s', (normal, ...spellings) => {
    const expected = parseUnit(normal);
    expect(expected.symbol).toBe(normal);
    for (const spelling of spellings) {
      const unit = parseUnit(spelling);
      expect(unit.dimension).toEqual(expected.dimension);
      expect([unit.factor, unit.divisor, unit.offset]).toEqual([expected.factor, expected.divisor, expected.offset]);
    }
  });

  test('a normalised symbol reads back as the same unit', () => {
    for (const text of ['m-2 W', 'J s^-1.5 K', 'kg m s-2', 'rad^0.5/d', '1/S0', 'S0^2', 'km/h']) {
      const unit = parseUnit(text);
      expect(parseUnit(unit.symbol)).toMatchObject({
        factor: unit.factor,
        divisor: unit.divisor,
        dimension: unit.dimension,
      });
    }
  });

  test('compound factors: values on paper', () => {
    expect(fromUnit(1, 'g/cm3')).toBe(1000);
    expect(fromUnit(36, 'km/h')).toBe(10);
    expect(fromUnit(1, 'kJ/kg/K')).toBe(1000);
    expect(fromUnit(87, 'mW/m2')).toBe(0.087);
    expect(fromUnit(2, 'tiu')).toBe(fromUnit(2, 'J/m2/K/s^0.5'));
    expect(fromUnit(1, 'cm^0.5')).toBeCloseTo(0.1, 15);
  });
});

describe('what is not a unit', () => {
  const bad: [text: string, what: string, mend: string][] = [
    ['Lsnu', '`Lsnu` is not a unit', 'Did you mean `Lsun`'],
    ['Lsn', '`Lsn` is not a unit', 'Did you mean `Lsun`'],
    ['k', '`k` is not a unit', 'Did you mean `K`'],
    ['pc', '`pc` is not a unit', 'Write it as in `au`, `W/m2` or `km/s`'],
    ['dex', '`dex` is not a unit', 'Write it as in `au`, `W/m2` or `km/s`'],
    ['Rerth', '`Rerth` is not a unit', 'Did you mean `Rearth`'],
    ['W/mm2/Kelvn', '`Kelvn` is not a unit', 'Did you mean `K`'],
    ['furlong', '`furlong` is not a unit', 'Write it as in `au`, `W/m2` or `km/s`'],
    ['', '`` is not a unit', 'Write it as in `au`, `W/m2` or `km/s`'],
    ['W/', '`W/` is not a unit', 'Write it as in `au`, `W/m2` or `km/s`'],
    ['W/(m2', '`W/(m2` is not a unit', 'Write it as in `au`, `W/m2` or `km/s`'],
    ['W/(m2/K)', '`W/(m2/K)` is not a unit', 'Write it as in `au`, `W/m2` or `km/s`'],
    ['W/m2 K', '`W/m2 K` can be read in two ways', 'Divide by each unit, as in `W/m2/K`'],
    ['W/m2·K', '`W/m2·K` can be read in two ways', 'Divide by each unit, as in `W/m2/K`'],
    ['m^0.3', '`m^0.3` has an odd exponent', 'Use a whole or half exponent'],
    ['m^0', '`m^0` has an odd exponent', 'Use a whole or half exponent'],
    ['m^9', '`m^9` has an odd exponent', 'Use a whole or half exponent'],
    ['m^(1/0)', '`m^1/0` has an odd exponent', 'Use a whole or half exponent'],
    ['J/degC', '`degC` stands alone, not in `J/degC`', 'Write `K`: a difference of 1 degC is 1 K'],
    ['% W', '`%` stands alone, not in `% W`', 'Write the number without it'],
    ['Lsun8 Lsun8', '`Lsun8 Lsun8` is too large or too small a unit', 'Use units nearer to SI'],
  ];
  test.each(bad)('%s', (text, what, mend) => {
    expect(errorOf(() => parseUnit(text))).toMatchObject({ where: 'unit', what, mend });
  });

  test('the expected dimension sharpens the advice', () => {
    expect(errorOf(() => parseUnit('C', 'temperature')).mend).toBe('Use `K` or `degC`');
    expect(errorOf(() => parseUnit('furlong', 'number')).mend).toBe('Leave the unit out');
  });
});

function errorOf(run: () => unknown): SimError {
  try {
    run();
  } catch (error) {
    if (error instanceof SimError) return error;
    throw error;
  }
  throw new Error('nothing was thrown');
}
