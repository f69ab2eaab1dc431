/** Our units as the CF conventions want them: in the grammar of UDUNITS, and angles in degrees. */
import { radiansPerDegree } from '../../sim/constants.ts';

export interface CfUnit {
  readonly text: string;
  /** SI per unit. */
  readonly size: number;
}

/** `W/m2/K` → `W m-2 K-1`, `1` → `1`, `rad` → `degree`. Errors: for a unit that is not a quotient of symbols. */
export function cfUnit(unit: string): CfUnit {
  if (unit === 'rad') return { text: 'degree', size: radiansPerDegree };
  const [over, ...under] = unit.split('/');
  const factors = [...(over === '1' ? [] : [over!]), ...under.map((symbol) => inverse(symbol, unit))];
  return { text: factors.join(' ') || '1', size: 1 };
}

function inverse(symbol: string, unit: string): string {
  const found = /^([A-Za-z]+)(\d?)$/.exec(symbol);
  if (found === null) throw new Error(`${unit} has no spelling in UDUNITS here`);
  return `${found[1]}-${found[2] || 1}`;
}
