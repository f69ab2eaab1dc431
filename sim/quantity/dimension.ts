/** Physical dimensions: what kind of number a scenario key takes. */

/** Exponents of m, kg, s, K and rad; whole or half, so exact in binary. The radian counts, so that an angle is no pure number. */
export type Dimension = readonly [length: number, mass: number, time: number, temperature: number, angle: number];

export type DimensionName =
  | 'number'
  | 'length'
  | 'mass'
  | 'power'
  | 'temperature'
  | 'angle'
  | 'time'
  | 'pressure'
  | 'flux'
  | 'arealHeatCapacity'
  | 'specificHeat'
  | 'conductivity'
  | 'heatTransferCoefficient'
  | 'density'
  | 'acceleration'
  | 'thermalInertia'
  | 'speed';

interface DimensionInfo {
  readonly exponents: Dimension;
  /** As it reads in an error. */
  readonly phrase: string;
  /** Units that an error offers, the most usual first. */
  readonly units: readonly string[];
}

export const dimensions: Readonly<Record<DimensionName, DimensionInfo>> = {
  number: { exponents: [0, 0, 0, 0, 0], phrase: 'a pure number', units: ['%'] },
  length: { exponents: [1, 0, 0, 0, 0], phrase: 'a length', units: ['au', 'km', 'm'] },
  mass: { exponents: [0, 1, 0, 0, 0], phrase: 'a mass', units: ['Mearth', 'Msun', 'kg'] },
  power: { exponents: [2, 1, -3, 0, 0], phrase: 'a power', units: ['Lsun', 'W'] },
  temperature: { exponents: [0, 0, 0, 1, 0], phrase: 'a temperature', units: ['K', 'degC'] },
  angle: { exponents: [0, 0, 0, 0, 1], phrase: 'an angle', units: ['deg', 'rad'] },
  time: { exponents: [0, 0, 1, 0, 0], phrase: 'a time', units: ['d', 'h', 'yr', 's'] },
  pressure: { exponents: [-1, 1, -2, 0, 0], phrase: 'a pressure', units: ['bar', 'hPa', 'Pa'] },
  flux: { exponents: [0, 1, -3, 0, 0], phrase: 'a flux', units: ['W/m2', 'S0'] },
  arealHeatCapacity: { exponents: [0, 1, -2, -1, 0], phrase: 'a heat capacity per area', units: ['J/m2/K'] },
  specificHeat: { exponents: [2, 0, -2, -1, 0], phrase: 'a specific heat', units: ['J/kg/K'] },
  conductivity: { exponents: [1, 1, -3, -1, 0], phrase: 'a thermal conductivity', units: ['W/m/K'] },
  heatTransferCoefficient: { exponents: [0, 1, -3, -1, 0], phrase: 'a flux per kelvin', units: ['W/m2/K'] },
  density: { exponents: [-3, 1, 0, 0, 0], phrase: 'a density', units: ['kg/m3', 'g/cm3'] },
  acceleration: { exponents: [1, 0, -2, 0, 0], phrase: 'an acceleration', units: ['m/s2'] },
  thermalInertia: { exponents: [0, 1, -2.5, -1, 0], phrase: 'a thermal inertia', units: ['J/m2/K/s^0.5', 'tiu'] },
  speed: { exponents: [1, 0, -1, 0, 0], phrase: 'a speed', units: ['km/s', 'm/s'] },
};

export function sameDimension(a: Dimension, b: Dimension): boolean {
  return a[0] === b[0] && a[1] === b[1] && a[2] === b[2] && a[3] === b[3] && a[4] === b[4];
}

/** `a length`, `a flux`, or base units where the trade has no name for it. */
export function describeDimension(dimension: Dimension): string {
  const named = Object.values(dimensions).find((info) => sameDimension(info.exponents, dimension));
  return named?.phrase ?? `a quantity in ${baseUnits(dimension)}`;
}

function baseUnits(dimension: Dimension): string {
  return ['m', 'kg', 's', 'K', 'rad']
    .map((symbol, index) => ({ symbol, power: dimension[index]! }))
    .filter(({ power }) => power !== 0)
    .map(({ symbol, power }) => symbol + (power === 1 ? '' : Number.isInteger(power) ? power : `^${power}`))
    .join(' ');
}
