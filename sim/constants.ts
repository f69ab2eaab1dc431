/** Constants, each with its source. SI throughout. */
import type { Flux, Metres } from './si.ts';

/** Stefan–Boltzmann constant, W m⁻² K⁻⁴. CODATA 2018 (exact in the 2019 SI; digits as published). */
export const stefanBoltzmann = 5.670374419e-8;
/** Newtonian constant of gravitation, m³ kg⁻¹ s⁻². CODATA 2018. */
export const gravitationalConstant = 6.6743e-11;
/** Planck constant, J s. CODATA 2018, exact. */
export const planckConstant = 6.62607015e-34;
/** Boltzmann constant, J K⁻¹. CODATA 2018, exact. */
export const boltzmannConstant = 1.380649e-23;
/** Speed of light in vacuum, m s⁻¹. Exact. */
export const speedOfLight = 299_792_458;

/** Astronomical unit, m. IAU 2012 Resolution B2, exact. */
export const metresPerAu: Metres = 149_597_870_700;
/** Nominal solar mass parameter, m³ s⁻². IAU 2015 Resolution B3 (Prša et al. 2016, AJ 152, 41). */
export const solarMassParameter = 1.3271244e20;
/** Nominal solar luminosity, W. IAU 2015 Resolution B3. */
export const solarLuminosity = 3.828e26;
/** Nominal solar radius, m. IAU 2015 Resolution B3. */
export const solarRadius: Metres = 6.957e8;
/** Nominal solar effective temperature, K. IAU 2015 Resolution B3. */
export const solarTemperature = 5772;
/** Nominal total solar irradiance, W m⁻²; the unit `S0`. IAU 2015 Resolution B3. */
export const solarIrradiance: Flux = 1361;
/** Nominal terrestrial equatorial radius, m. IAU 2015 Resolution B3. */
export const earthRadius: Metres = 6.3781e6;
/** Nominal jovian equatorial radius, m. IAU 2015 Resolution B3. */
export const jupiterRadius: Metres = 7.1492e7;
/** Nominal terrestrial mass parameter, m³ s⁻². IAU 2015 Resolution B3. */
export const earthMassParameter = 3.986004e14;
/** Nominal jovian mass parameter, m³ s⁻². IAU 2015 Resolution B3. */
export const jupiterMassParameter = 1.2668653e17;

/** Masses from the nominal mass parameters and CODATA 2018 G, kg: the products GM are the better known. */
export const solarMass = solarMassParameter / gravitationalConstant;
export const earthMass = earthMassParameter / gravitationalConstant;
export const jupiterMass = jupiterMassParameter / gravitationalConstant;

export const secondsPerDay = 86_400;
/** Julian year of 365.25 days, s: the unit `yr` (IAU). */
export const secondsPerYear = 365.25 * secondsPerDay;
export const radiansPerDegree = Math.PI / 180;
/** 0 °C in kelvin, exact. */
export const zeroCelsius = 273.15;
/** Standard atmosphere, Pa. 10th CGPM (1954) Resolution 4, exact. */
export const standardAtmosphere = 101_325;
