/** Reads a unit: one of the table, or products and quotients of them with whole or half exponents. */
import { SimError } from '../error.ts';
import { type Dimension, type DimensionName, dimensions, sameDimension } from './dimension.ts';
import { nearest } from './nearest.ts';
import { type TableUnit, type Unit, unitByName, unitNamed } from './unitTable.ts';

export type { Unit } from './unitTable.ts';

interface Term {
  readonly unit: TableUnit;
  readonly exponent: number;
}

/** Typographic forms that mean what a plain one means: superscripts, dots, U+03BC for the micro sign. */
const plainUnitSign: Readonly<Record<string, string>> = {
  ...Object.fromEntries([...'⁰¹²³⁴⁵⁶⁷⁸⁹'].map((sign, digit) => [sign, String(digit)])),
  '⁻': '-',
  '−': '-',
  '⁺': '+',
  ᐟ: '/',
  '½': '0.5',
  '·': '*',
  '⋅': '*',
  '∙': '*',
  μ: 'µ',
};
const fancySign = /[⁰¹²³⁴⁵⁶⁷⁸⁹⁻−⁺ᐟ½·⋅∙μ]/g;

const symbolPattern = /S0(?![\d.])|1(?![\d.])|[A-Za-zµ°%⊕☉⊙♃_]+/y;
/** `^-0.5`, `**2`, `-1/2`, `2`; or in parentheses after a caret. */
const exponentPattern = /(?:\^|\*\*)\(([^()]*)\)|(?:\^|\*\*)?([+-]?(?:\d+(?:\.\d+)?|\.\d+)(?:\/\d+)?)/y;
const separatorPattern = /\s*(\/)\s*(\()?\s*|\s*\*\s*|\s+/y;

/**
 * A unit from its text: `au`, `W/m2`, `W m-2`, `W m⁻²`, `J/m2/K/s^0.5`, `J/(m2 K s^1/2)`.
 * Shape:  text in, a unit out whose `symbol` is the normalised spelling; `expected` only sharpens the advice.
 * Units:  SI value = number · factor / divisor + offset.
 * Errors: SimError at `unit`, with a near spelling or the usual units, for anything unknown or ambiguous.
 */
export function parseUnit(text: string, expected?: DimensionName): Unit {
  const known = unitNamed(text);
  if (known) return known;
  const plain = text.trim().replace(fancySign, (sign) => plainUnitSign[sign]!);
  return unitNamed(plain) ?? combine(readTerms(plain, text, expected), text);
}

/** `value` in `unit` as SI; a unit with an offset takes it in. */
export function toSi(value: number, unit: Unit): number {
  return (value * unit.factor) / unit.divisor + unit.offset;
}

/** A difference of `value` in `unit` as SI: 2 degC is 2 K. */
export function differenceToSi(value: number, unit: Unit): number {
  return (value * unit.factor) / unit.divisor;
}

function readTerms(plain: string, text: string, expected: DimensionName | undefined): Term[] {
  const terms: Term[] = [];
  let at = 0;
  let below = false; // the next term is divided by
  let inGroup = false; // between the parentheses of `/(m2 K)`
  for (;;) {
    symbolPattern.lastIndex = at;
    const symbol = symbolPattern.exec(plain)?.[0];
    if (symbol === undefined) throw unknownUnit(text, expected);
    const unit = unitNamed(symbol);
    if (!unit) throw unknownUnit(symbol, symbol === plain ? expected : undefined, expected);
    at += symbol.length;

    exponentPattern.lastIndex = at;
    const power = exponentPattern.exec(plain);
    const exponent = power ? readExponent((power[1] ?? power[2])!, symbol) : 1;
    at += power?.[0].length ?? 0;
    terms.push({ unit, exponent: below ? -exponent : exponent });

    if (inGroup && plain[at] === ')') {
      inGroup = false;
      at++;
    }
    if (at === plain.length && !inGroup) return terms;
    separatorPattern.lastIndex = at;
    const separator = separatorPattern.exec(plain);
    if (!separator || (inGroup && separator[1])) throw unknownUnit(text, expected);
    if (below && !inGroup && !separator[1]) throw ambiguousUnit(text);
    at += separator[0].length;
    if (separator[1]) below = true;
    if (separator[2]) inGroup = true;
  }
}

function readExponent(text: string, symbol: string): number {
  const [top, bottom = '1', ...more] = text.split('/');
  const exponent = Number(top) / Number(bottom);
  if (more.length > 0 || !Number.isInteger(2 * exponent) || exponent === 0 || Math.abs(exponent) > 8) {
    throw new SimError('unit', `\`${symbol}^${text}\` has an odd exponent`, 'Use a whole or half exponent');
  }
  return exponent;
}

function combine(terms: readonly Term[], text: string): Unit {
  const first = terms[0]!;
  if (terms.length === 1 && first.exponent === 1) return first.unit;
  let factor = 1;
  let divisor = 1;
  const dimension: [number, number, number, number, number] = [0, 0, 0, 0, 0];
  for (const { unit, exponent } of terms) {
    if (unit.standsAlone && unit.symbol !== '1') throw lonelyUnit(unit, text);
    const size = Math.abs(exponent);
    factor *= (exponent > 0 ? unit.factor : unit.divisor) ** size;
    divisor *= (exponent > 0 ? unit.divisor : unit.factor) ** size;
    addInto(dimension, unit.dimension, exponent);
  }
  if (!(factor / divisor > 0 && Number.isFinite(factor) && Number.isFinite(divisor))) {
    throw new SimError('unit', `\`${text}\` is too large or too small a unit`, 'Use units nearer to SI');
  }
  return { symbol: normalSymbol(terms), ...reduced(factor, divisor), offset: 0, dimension };
}

function addInto(sum: [number, number, number, number, number], dimension: Dimension, times: number): void {
  for (let index = 0; index < sum.length; index++) sum[index]! += times * dimension[index]!;
}

/** Cancels what divides evenly, so that g/cm3 is a factor of exactly 1000. */
function reduced(factor: number, divisor: number): { factor: number; divisor: number } {
  if (factor % divisor === 0) return { factor: factor / divisor, divisor: 1 };
  if (divisor % factor === 0) return { factor: 1, divisor: divisor / factor };
  return { factor, divisor };
}

/** `W m-2` → `W/m2`; `s-1/2 J` → `J/s^0.5`; `s-1` → `1/s`. */
function normalSymbol(terms: readonly Term[]): string {
  const named = terms.filter(({ unit }) => unit.symbol !== '1');
  const above = named.filter(({ exponent }) => exponent > 0).map(powerSymbol);
  const below = named.filter(({ exponent }) => exponent < 0).map((term) => `/${powerSymbol(term)}`);
  return (above.join(' ') || '1') + below.join('');
}

function powerSymbol({ unit, exponent }: Term): string {
  const size = Math.abs(exponent);
  if (size === 1) return unit.symbol;
  const needsCaret = !Number.isInteger(size) || /\d$/.test(unit.symbol);
  return unit.symbol + (needsCaret ? '^' : '') + size;
}

/** `ofWhole`: what the word should measure, where it is the whole unit and no part of one. */
function unknownUnit(word: string, ofWhole: DimensionName | undefined, expected = ofWhole): SimError {
  const near = /^[\p{L}_]+$/u.test(word) ? nearest(word, plausibleUnits(word, ofWhole)) : null;
  const mend = near === null ? usualUnits(expected) : `Did you mean \`${unitByName.get(near)!.symbol}\``;
  return new SimError('unit', `\`${word}\` is not a unit`, mend);
}

/** Units that a misspelt word can mean: of the kind that is wanted, and for a short word more than one letter in common. */
function plausibleUnits(word: string, expected: DimensionName | undefined): string[] {
  return [...unitByName].flatMap(([name, { dimension }]) => {
    const fits = expected === undefined || sameDimension(dimension, dimensions[expected].exponents);
    return fits && (word.length > shortWord || isSlip(word.toLowerCase(), name.toLowerCase())) ? [name] : [];
  });
}

const shortWord = 3;

/** One letter too many or too few, or the same letters in another order or case; another letter makes another word. */
function isSlip(word: string, name: string): boolean {
  if (word.length !== name.length) return true; // how far is for `nearest` to say
  const inOrder = (text: string) => [...text].sort().join('');
  return inOrder(word) === inOrder(name);
}

function usualUnits(expected: DimensionName | undefined): string {
  if (expected === undefined) return 'Write it as in `au`, `W/m2` or `km/s`';
  if (expected === 'number') return 'Leave the unit out';
  return `Use ${dimensions[expected].units.map((unit) => `\`${unit}\``).join(' or ')}`;
}

function ambiguousUnit(text: string): SimError {
  return new SimError('unit', `\`${text}\` can be read in two ways`, 'Divide by each unit, as in `W/m2/K`');
}

function lonelyUnit(unit: TableUnit, text: string): SimError {
  const mend = unit.symbol === 'degC' ? 'Write `K`: a difference of 1 degC is 1 K' : 'Write the number without it';
  return new SimError('unit', `\`${unit.symbol}\` stands alone, not in \`${text}\``, mend);
}
