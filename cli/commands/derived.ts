/** A derived value in the units of the trade. */

import { solarIrradiance } from '../../sim/constants.ts';
import { formatInstantUtc, formatNumber, formatQuantity, julianDateTdb } from '../../sim/quantity/index.ts';
import type { Derived } from '../../sim/scenario/types.ts';

const shownIn: Readonly<Record<string, string>> = { m: 'au', s: 'd', kg: 'Msun', W: 'Lsun', rad: 'deg' };
const digits = 5;
/** ISO dates end within this of J2000, s. */
const longestCalendar = 2e11;

export function derivedText({ key, value, unit }: Derived): string {
  if (key === 'orbit.periapsisTime') return dateText(value);
  const text = formatQuantity(value, shownIn[unit] ?? unit, digits);
  return unit === 'W/m2' ? `${text} = ${formatNumber(value / solarIrradiance, digits)} S0` : text;
}

/** What to call it where dates are shown as dates. */
export function derivedLabel({ key, label }: Derived): string {
  return key === 'orbit.periapsisTime' ? 'Periapsis' : label;
}

function dateText(tdbSeconds: number): string {
  const julian = `${julianDateTdb(tdbSeconds).toFixed(5)} TDB`;
  return Math.abs(tdbSeconds) < longestCalendar ? `${formatInstantUtc(tdbSeconds)} = ${julian}` : julian;
}
