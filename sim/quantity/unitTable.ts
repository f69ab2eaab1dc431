/**
 * The units that stand alone; everything else is a product or quotient of them (`units.ts`).
 * SI value = number · factor / divisor + offset. A divisor keeps decimal fractions exact: 35 % is 0.35 to the last bit.
 * Factors are exact by definition (SI Brochure, 9th ed.) or come from `constants.ts` with their source.
 */
import {
  earthMass,
  earthRadius,
  jupiterMass,
  jupiterRadius,
  metresPerAu,
  radiansPerDegree,
  secondsPerDay,
  secondsPerYear,
  solarIrradiance,
  solarLuminosity,
  solarMass,
  solarRadius,
  standardAtmosphere,
  zeroCelsius,
} from '../constants.ts';
import { type Dimension, dimensions } from './dimension.ts';

export interface Unit {
  /** For printing and for reading back. */
  readonly symbol: string;
  readonly factor: number;
  readonly divisor: number;
  /** SI value of zero; differences leave it out. */
  readonly offset: number;
  readonly dimension: Dimension;
}

export interface TableUnit extends Unit {
  /** Other spellings. */
  readonly aliases: readonly string[];
  /** Refused inside a product or a power. */
  readonly standsAlone: boolean;
}

const of = (name: keyof typeof dimensions): Dimension => dimensions[name].exponents;
const energy: Dimension = [2, 1, -2, 0, 0];

interface Scale {
  factor?: number;
  divisor?: number;
  offset?: number;
  standsAlone?: boolean;
}

function unit(symbol: string, dimension: Dimension, scale: Scale = {}, aliases: readonly string[] = []): TableUnit {
  return { symbol, dimension, factor: 1, divisor: 1, offset: 0, standsAlone: false, ...scale, aliases };
}

/** `R_sun`, `R☉`, `R_☉`. */
function astronomical(letter: string, name: string, ...signs: readonly string[]): string[] {
  return [`${letter}_${name}`, ...signs.flatMap((sign) => [letter + sign, `${letter}_${sign}`])];
}

/** U+2609 is the Sun's sign; U+2299, a circled dot, is often typed for it. */
const sunSigns = ['☉', '⊙'];
const kilo = 1000;

export const unitTable: readonly TableUnit[] = [
  unit('1', of('number'), { standsAlone: true }),
  unit('%', of('number'), { divisor: 100, standsAlone: true }, ['percent']),
  unit('ppm', of('number'), { divisor: 1e6, standsAlone: true }),

  unit('m', of('length'), {}, ['metre', 'metres', 'meter', 'meters']),
  unit('km', of('length'), { factor: kilo }),
  unit('cm', of('length'), { divisor: 100 }),
  unit('mm', of('length'), { divisor: 1000 }),
  unit('um', of('length'), { divisor: 1e6 }, ['µm', 'micron', 'microns']),
  unit('nm', of('length'), { divisor: 1e9 }),
  unit('au', of('length'), { factor: metresPerAu }, ['AU', 'A.U.', 'a.u.']),
  unit('Rearth', of('length'), { factor: earthRadius }, astronomical('R', 'earth', '⊕')),
  unit('Rjup', of('length'), { factor: jupiterRadius }, ['RJup', 'R_Jup', 'R_J', ...astronomical('R', 'jup', '♃')]),
  unit('Rsun', of('length'), { factor: solarRadius }, astronomical('R', 'sun', ...sunSigns)),

  unit('kg', of('mass')),
  unit('g', of('mass'), { divisor: 1000 }),
  unit('Mearth', of('mass'), { factor: earthMass }, astronomical('M', 'earth', '⊕')),
  unit('Mjup', of('mass'), { factor: jupiterMass }, ['MJup', 'M_Jup', 'M_J', ...astronomical('M', 'jup', '♃')]),
  unit('Msun', of('mass'), { factor: solarMass }, astronomical('M', 'sun', ...sunSigns)),

  unit('W', of('power')),
  unit('mW', of('power'), { divisor: 1000 }),
  unit('kW', of('power'), { factor: kilo }),
  unit('Lsun', of('power'), { factor: solarLuminosity }, astronomical('L', 'sun', ...sunSigns)),
  unit('J', energy),
  unit('kJ', energy, { factor: kilo }),
  unit('MJ', energy, { factor: 1e6 }),

  unit('K', of('temperature'), {}, ['kelvin', 'Kelvin']),
  unit('degC', of('temperature'), { offset: zeroCelsius, standsAlone: true }, ['°C', 'celsius', 'Celsius']),

  unit('rad', of('angle'), {}, ['radian', 'radians']),
  unit('deg', of('angle'), { factor: radiansPerDegree }, ['°', 'degree', 'degrees']),
  unit('arcmin', of('angle'), { factor: radiansPerDegree, divisor: 60 }),
  unit('arcsec', of('angle'), { factor: radiansPerDegree, divisor: 3600 }),
  unit('mas', of('angle'), { factor: radiansPerDegree, divisor: 3.6e6 }),

  unit('s', of('time'), {}, ['sec', 'second', 'seconds']),
  unit('min', of('time'), { factor: 60 }, ['minute', 'minutes']),
  unit('h', of('time'), { factor: 3600 }, ['hr', 'hour', 'hours']),
  unit('d', of('time'), { factor: secondsPerDay }, ['day', 'days']),
  unit('yr', of('time'), { factor: secondsPerYear }, ['year', 'years']),

  unit('Pa', of('pressure')),
  unit('hPa', of('pressure'), { factor: 100 }),
  unit('kPa', of('pressure'), { factor: kilo }),
  unit('MPa', of('pressure'), { factor: 1e6 }),
  unit('mbar', of('pressure'), { factor: 100 }),
  unit('bar', of('pressure'), { factor: 1e5 }, ['bars']),
  unit('atm', of('pressure'), { factor: standardAtmosphere }),

  unit('S0', of('flux'), { factor: solarIrradiance }, ['S⊕', 'S_earth', 'Searth', 'S_0']),
  unit('tiu', of('thermalInertia'), {}, ['TIU']),
];

export const unitByName: ReadonlyMap<string, TableUnit> = new Map(
  unitTable.flatMap((entry) => [entry.symbol, ...entry.aliases].map((name) => [name, entry] as const)),
);

/** Symbols of Sun, Earth and Jupiter mean one thing, however they are capitalised. */
const anyCase = /^[RML]_?(?:sun|earth|jup)$/i;

const unitByLowerName: ReadonlyMap<string, TableUnit> = new Map(
  unitTable
    .flatMap((entry) => [entry.symbol, ...entry.aliases].map((name) => [name.toLowerCase(), entry] as const))
    .filter(([name]) => anyCase.test(name)),
);

/** A unit that stands in the table. */
export function unitNamed(name: string): TableUnit | undefined {
  return unitByName.get(name) ?? unitByLowerName.get(name.toLowerCase());
}
