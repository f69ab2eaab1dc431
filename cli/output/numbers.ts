/** Numbers for tables: as many digits as mean something, and the numerical error where it reaches the last one. */

/** Fixed decimals; where the error reaches the last digit shown, fewer of them and the error beside. */
export function withError(value: number, decimals: number, plusMinus = 0): string {
  if (plusMinus < 0.5 * 10 ** -decimals) return fixed(value, decimals);
  const kept = Math.max(0, Math.min(decimals, 1 - Math.floor(Math.log10(plusMinus))));
  return `${fixed(value, kept)} ± ${roundedUp(plusMinus, kept)}`;
}

/** Significant digits, plain between a thousandth and a hundred thousand, otherwise with an exponent. */
export function significant(value: number, digits: number): string {
  const size = Math.abs(value);
  if (size !== 0 && (size < 1e-3 || size >= 1e5)) return value.toExponential(digits - 1);
  const text = value.toPrecision(digits);
  return text.includes('e') ? String(Math.round(value)) : text;
}

/** A share as per cent to one decimal; a little is not nothing and nearly all is not all. */
export function percent(share: number): string {
  if (share > 0 && share < 5e-4) return '< 0.1';
  if (share < 1 && share > 1 - 5e-4) return '> 99.9';
  return fixed(100 * share, 1);
}

/** The size of a difference: one digit is enough. */
export function magnitude(value: number): string {
  return value === 0 ? '0' : value.toExponential(0).replace('e+', 'e');
}

function fixed(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  return /^-0\.?0*$/.test(text) ? text.slice(1) : text;
}

/** An error bound must not shrink by rounding. */
function roundedUp(value: number, decimals: number): string {
  const unit = 10 ** -decimals;
  return (Math.ceil(value / unit - 1e-9) * unit).toFixed(decimals);
}
