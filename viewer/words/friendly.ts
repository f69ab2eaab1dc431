/** SI values in the units of the trade, for readers: six digits, idle zeros left away. Pure. */
import { metresPerAu, radiansPerDegree, solarLuminosity } from '../../sim/constants.ts';
import { exact, timeUnit, withUnit } from './number.ts';

/** A length below this is a body's, above it an orbit's. */
const shortestOrbit = 0.002 * metresPerAu;
/** A power above this is a star's. */
const faintestStar = 1e20;

/** `0.48 au` for 7.18e10 m; SI where that is what the trade uses. */
export function friendly(value: number, unit: string): string {
  switch (unit) {
    case 's': {
      const { seconds, symbol } = timeUnit(Math.abs(value));
      return rounded(value / seconds, symbol);
    }
    case 'm':
      return value >= shortestOrbit ? rounded(value / metresPerAu, 'au') : rounded(value, unit);
    case 'rad':
      return `${rounded(value / radiansPerDegree, '1')}°`;
    case 'W':
      return value >= faintestStar ? rounded(value / solarLuminosity, 'Lsun') : rounded(value, unit);
    default:
      return rounded(value, unit);
  }
}

function rounded(value: number, unit: string): string {
  return withUnit(exact(Number(value.toPrecision(6))), unit);
}
