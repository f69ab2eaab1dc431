import { expect, test } from 'vitest';
import * as constantsModule from '../../sim/constants.ts';
import { relativeError } from './relative.ts';

/**
 * Exact or adopted values, compared to the last digit.
 * IAU 2012 Resolution B2 (au); IAU 2015 Resolution B3, Prša et al. (2016) AJ 152, 41 (nominal solar and planetary values;
 * solar L, R, T, S₀ seen, the planetary ones from memory); CODATA 2018, Tiesinga et al. (2021) Rev. Mod. Phys. 93, 025010.
 */
const adopted = {
  metresPerAu: 149_597_870_700,
  solarMassParameter: 1.3271244e20,
  solarLuminosity: 3.828e26,
  solarRadius: 6.957e8,
  solarTemperature: 5772,
  solarIrradiance: 1361,
  earthRadius: 6.3781e6,
  jupiterRadius: 7.1492e7,
  earthMassParameter: 3.986004e14,
  jupiterMassParameter: 1.2668653e17,
  planckConstant: 6.62607015e-34,
  boltzmannConstant: 1.380649e-23,
  speedOfLight: 299_792_458,
  gravitationalConstant: 6.6743e-11,
  stefanBoltzmann: 5.670374419e-8,
  secondsPerDay: 86_400,
  secondsPerYear: 31_557_600, // Julian year of 365.25 d, IAU
  zeroCelsius: 273.15,
} as const;

const constants = { ...constantsModule };

test('adopted values', () => expect(constants).toMatchObject(adopted));

const { planckConstant: h, boltzmannConstant: k, speedOfLight: c, stefanBoltzmann: sigma } = constants;
const { solarLuminosity, solarRadius, solarIrradiance, metresPerAu } = constants;

test('σ = 2π⁵k⁴/(15h³c²): the printed digits are the exact ones cut off after ten', () => {
  const exact = (2 * Math.PI ** 5 * k ** 4) / (15 * h ** 3 * c ** 2);
  expect(relativeError(exact, 5.6703744191844294e-8)).toBeLessThan(1e-15); // from memory, 17 digits; a few roundings
  expect(relativeError(sigma, exact)).toBeLessThan(5e-11); // half a unit of the tenth digit
});

/** The nominal solar set is a convention, consistent only so far. Calculated with other software, 10 digits, hence 1e-9. */
test('how far the nominal Sun agrees with itself', () => {
  const effectiveTemperature = (solarLuminosity / (4 * Math.PI * solarRadius ** 2 * sigma)) ** 0.25;
  expect(relativeError(effectiveTemperature, 5772.003429)).toBeLessThan(1e-9);
  const irradiance = solarLuminosity / (4 * Math.PI * metresPerAu ** 2);
  expect(relativeError(irradiance, 1361.166465)).toBeLessThan(1e-9);
  // 1.2e-4 apart: a scenario that gives 1 Lsun at 1 au gets 1361.17 W m⁻², not S₀
  expect(relativeError(irradiance, solarIrradiance)).toBeGreaterThan(1.2e-4);
  expect(relativeError(4 * Math.PI * metresPerAu ** 2 * solarIrradiance, 3.82753185e26)).toBeLessThan(1e-9);
});

/** Calculated, 10 digits: what a black planet at 1 au has. */
test('black body at 1 au', () => {
  const steady = (flux: number) => (flux / sigma) ** 0.25;
  expect(relativeError(steady(solarIrradiance / 4), 278.3213994)).toBeLessThan(1e-9);
  expect(relativeError(steady(solarIrradiance), 393.6058977)).toBeLessThan(1e-9);
  expect(relativeError(steady(solarLuminosity / (16 * Math.PI * metresPerAu ** 2)), 278.3299094)).toBeLessThan(1e-9);
});

/**
 * Masses from nominal GM and CODATA 2018 G as another astronomy library tabulates them (from memory); the quotient of two
 * doubles is good to an ulp. G itself is known to 2.2e-5 only.
 */
test('masses', () => {
  expect(relativeError(constants.solarMass, 1.988409870698051e30)).toBeLessThan(4e-16);
  expect(relativeError(constants.earthMass, 5.972167867791379e24)).toBeLessThan(4e-16);
  expect(relativeError(constants.jupiterMass, 1.8981245973360505e27)).toBeLessThan(4e-16);
});

test('units of time and angle', () => {
  expect(constants.radiansPerDegree * 180).toBe(Math.PI);
});
