/** Windows: ranges as given, and published habitable limits at this star's temperature. */
import type { Kelvin } from '../../si.ts';
import { habitableFlux, habitableTemperatureRange } from '../../star/habitable.ts';
import type { Window } from '../../world.ts';
import type { Given } from './given.ts';
import { shown } from './show.ts';
import type { StarParts } from './star.ts';

export function buildWindows(given: Given, star: StarParts): readonly Window[] {
  given.use('windows');
  return Object.entries(given.keys.windows ?? {}).flatMap(([name, window]) => {
    if (!('habitable' in window)) return [{ name, of: window.of, from: window.from, to: window.to }];
    given.use(...star.temperatureKeys);
    return habitableWindow(given, name, window.habitable as [HabitableName, HabitableName], star.temperature) ?? [];
  });
}

type HabitableName = Parameters<typeof habitableFlux>[0];

function habitableWindow(
  given: Given,
  name: string,
  limits: [HabitableName, HabitableName],
  temperature: Kelvin | null,
): Window | null {
  const [inner, outer] = limits;
  if (inner === outer) {
    return given.wrong(`windows.${name}.habitable`, `both limits are ${inner}`, 'Name an inner and an outer limit');
  }
  if (habitableFlux(inner, sunlike) < habitableFlux(outer, sunlike)) {
    const what = `${inner} lies farther out than ${outer}`;
    return given.wrong(`windows.${name}.habitable`, what, `Write the inner limit first: [${outer}, ${inner}]`);
  }
  const reason = whyNot(temperature);
  if (reason) return { name, of: 'instellation', from: 0, to: 0, unavailable: reason };
  const fluxes = limits.map((limit) => habitableFlux(limit, temperature!));
  return { name, of: 'instellation', from: Math.min(...fluxes), to: Math.max(...fluxes) };
}

/** Where the limits are compared, K: their order is the same for every star that they are published for. */
const sunlike: Kelvin = 5780;

function whyNot(temperature: Kelvin | null): string | null {
  if (temperature === null) return 'the habitable limits depend on the temperature of the star, which is not given';
  const { from, to } = habitableTemperatureRange;
  if (temperature >= from && temperature <= to) return null;
  return `the star has ${shown(temperature, 'K', 5)}; the habitable limits were published for ${from} to ${to} K`;
}
