/**
 * Luminosity, effective temperature and radius of a star, each from the other two: L = 4πR²σT⁴, which defines the
 * effective temperature.
 * Units:  luminosity W; temperature K; radius m.
 * Errors: SimError unless both inputs are finite and above zero.
 * Source: IAU 2015 Resolution B3 (Prša et al. 2016, AJ 152, 41). The nominal solar set obeys it to 2e-6.
 */
import { stefanBoltzmann } from '../constants.ts';
import { requirePositive } from '../error.ts';
import type { Kelvin, Metres, Watts } from '../si.ts';

export function luminosityFromTemperature(temperature: Kelvin, radius: Metres): Watts {
  requirePositive('star.temperature', temperature, 'K');
  requirePositive('star.radius', radius, 'm');
  return 4 * Math.PI * radius ** 2 * stefanBoltzmann * temperature ** 4;
}

export function temperatureFromLuminosity(luminosity: Watts, radius: Metres): Kelvin {
  requirePositive('star.luminosity', luminosity, 'W');
  requirePositive('star.radius', radius, 'm');
  return (luminosity / (4 * Math.PI * radius ** 2 * stefanBoltzmann)) ** 0.25;
}

export function radiusFromLuminosity(luminosity: Watts, temperature: Kelvin): Metres {
  requirePositive('star.luminosity', luminosity, 'W');
  requirePositive('star.temperature', temperature, 'K');
  return Math.sqrt(luminosity / (4 * Math.PI * stefanBoltzmann)) / temperature ** 2;
}
