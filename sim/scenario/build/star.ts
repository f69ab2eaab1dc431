/** Star keys → luminosity, temperature, radius and mass, each where it is known. */
import type { Quantity } from '../../quantity/index.ts';
import { massFromDensity } from '../../star/density.ts';
import { luminosityFromTemperature, radiusFromLuminosity, temperatureFromLuminosity } from '../../star/luminosity.ts';
import { agree, type Estimate } from './agree.ts';
import { type Given, relativeSigma } from './given.ts';

export interface StarParts {
  readonly luminosity: Estimate | null;
  readonly temperature: number | null;
  readonly radius: Estimate | null;
  /** What temperature and radius rest on beside the luminosity: marked as used by what needs them. */
  readonly temperatureKeys: readonly string[];
  readonly radiusKeys: readonly string[];
  readonly mass: Estimate | null;
}

export function buildStar(given: Given): StarParts {
  const { temperature = null, radius = null } = given.keys.star ?? {};
  checkTemperature(given, temperature);
  const luminosity = buildLuminosity(given, temperature, radius);
  const knownRadius = radius ? estimate('radius', radius) : radiusOf(luminosity, temperature);
  const radiusKeys = [radius ? 'star.radius' : 'star.temperature'];
  return {
    luminosity,
    temperature: temperature?.value ?? temperatureOf(given, luminosity, radius),
    radius: knownRadius,
    temperatureKeys: [temperature ? 'star.temperature' : 'star.radius'],
    radiusKeys,
    mass: buildMass(given, knownRadius, radiusKeys),
  };
}

/** From brown dwarfs to the hottest stars that burn hydrogen, K. */
const [coolestStar, hottestStar] = [2000, 60_000];

function checkTemperature(given: Given, temperature: Quantity | null): void {
  if (!temperature || (temperature.value >= coolestStar && temperature.value <= hottestStar)) return;
  given.warn(
    () =>
      `A star of ${temperature.text} would be unusual: most have between ${coolestStar} and ${hottestStar} K. Is star.temperature right?`,
  );
}

function estimate(name: string, quantity: Quantity): Estimate {
  return {
    value: quantity.value,
    relativeSigma: relativeSigma(quantity),
    source: () => `${name} ${quantity.text}`,
    isGiven: true,
  };
}

function buildLuminosity(given: Given, temperature: Quantity | null, radius: Quantity | null): Estimate | null {
  const luminosity = given.quantity('star.luminosity');
  const radiated = temperature && radius && radiatedBy(temperature, radius);
  if (luminosity) {
    const direct = estimate('luminosity', luminosity);
    if (radiated) {
      agree(given, { key: 'star.luminosity', label: 'Luminosity', unit: 'Lsun', chosen: direct, other: radiated });
    }
    return direct;
  }
  if (radiated) {
    given.use('star.temperature', 'star.radius');
    given.derive('star.luminosity', radiated.value, 'W', 'Luminosity');
    return radiated;
  }
  const names = ['luminosity', 'temperature', 'radius'];
  const mend = 'Write luminosity, e.g. 0.52 Lsun, or temperature and radius';
  if (given.has('star.temperature'))
    return given.missing('star', names, 'temperature alone does not give a luminosity', mend);
  if (given.has('star.radius')) return given.missing('star', names, 'radius alone does not give a luminosity', mend);
  return given.missing('star', names, 'no luminosity is given', mend);
}

function radiatedBy(temperature: Quantity, radius: Quantity): Estimate {
  return {
    value: luminosityFromTemperature(temperature.value, radius.value),
    relativeSigma: Math.hypot(4 * relativeSigma(temperature), 2 * relativeSigma(radius)),
    source: () => `temperature ${temperature.text} and radius ${radius.text}`,
  };
}

function temperatureOf(given: Given, luminosity: Estimate | null, radius: Quantity | null): number | null {
  if (!luminosity || !radius) return null;
  const value = temperatureFromLuminosity(luminosity.value, radius.value);
  given.derive('star.temperature', value, 'K', 'Effective temperature');
  return value;
}

function radiusOf(luminosity: Estimate | null, temperature: Quantity | null): Estimate | null {
  if (!luminosity || !temperature) return null;
  return {
    value: radiusFromLuminosity(luminosity.value, temperature.value),
    relativeSigma: Math.hypot(luminosity.relativeSigma / 2, 2 * relativeSigma(temperature)),
    source: () => `${luminosity.source()} and temperature ${temperature.text}`,
  };
}

function buildMass(given: Given, radius: Estimate | null, radiusKeys: readonly string[]): Estimate | null {
  const mass = given.quantity('star.mass');
  if (mass) return estimate('star mass', mass);
  const density = given.quantity('star.density');
  if (!density) return null;
  if (!radius) {
    if (given.has('star.radius') || given.has('star.temperature')) return null;
    return given.wrong(
      'star.density',
      'the density gives a mass only with a radius',
      'Add star.radius, e.g. 0.924 Rsun, or write star.mass',
    );
  }
  given.use(...radiusKeys);
  const value = massFromDensity(density.value, radius.value);
  given.derive('star.mass', value, 'kg', 'Star mass');
  return {
    value,
    relativeSigma: Math.hypot(relativeSigma(density), 3 * radius.relativeSigma),
    source: () => `star density ${density.text} and ${radius.source()}`,
  };
}
