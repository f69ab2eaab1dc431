/**
 * A regular expression (ECMA-262, for JSON Schema) that every text passes which `parseQuantity` reads: a number and a unit of a
 * sensible spelling, or one of the uncertain forms. Which unit it is, it leaves to the reader.
 */
import { dimensions, sameDimension } from './dimension.ts';
import type { QuantitySpec } from './parse.ts';
import { unitTable } from './unitTable.ts';

const number = String.raw`[+−-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+−-]?\d+)?`;
/** Starts like a unit, not like `to`, `log` or an exponent; `log` and a confidence may follow it. */
const unit = String.raw`(?!to\b|log\b|[eE][+−-]?\d)[A-Za-zµμ°%⊕☉⊙♃_][^±<>,]*`;
const before = String.raw`(?:${number}[^<]*(?:±|\+/-|[−-]|\bto\s)\s*|<\s*)?`;

/** Anchored at both ends. */
export function quantityPattern({ spread = true, isotropic = false }: QuantitySpec): string {
  const whole = String.raw`${spread ? before : ''}${number}\s*${unit}`;
  return String.raw`^\s*(?:${whole}${isotropic ? '|isotropic' : ''})\s*$`;
}

/** The units of a key in words, the most usual first: `au, km, m, cm`. */
export function unitsInWords({ dimension }: QuantitySpec): string {
  const { units, exponents } = dimensions[dimension];
  const single = unitTable.filter((entry) => sameDimension(entry.dimension, exponents)).map(({ symbol }) => symbol);
  return [...new Set([...units, ...single])].join(', ');
}
