/** Reads a quantity as the user wrote it: a number with its unit, or one of the uncertain forms of the scenario contract. */
import { SimError } from '../error.ts';
import { type DimensionName, describeDimension, dimensions, sameDimension } from './dimension.ts';
import { formatQuantity } from './format.ts';
import { normalQuantile } from './normalQuantile.ts';
import type { Distribution, Quantity } from './types.ts';
import { differenceToSi, parseUnit, toSi, type Unit } from './units.ts';
import { unitByName } from './unitTable.ts';

/** What a key takes. Bounds are SI: `min` and `max` inclusive, `above` and `below` exclusive, `positive` = above 0. */
export interface QuantitySpec {
  readonly dimension: DimensionName;
  readonly min?: number;
  readonly max?: number;
  readonly above?: number;
  readonly below?: number;
  readonly positive?: boolean;
  /** False where only a single value makes sense. Default true. */
  readonly spread?: boolean;
  /** The word `isotropic` is welcome. Default false. */
  readonly isotropic?: boolean;
}

/** A number and the unit behind it (empty when none is written), as one form has several. */
interface Piece {
  readonly text: string;
  readonly value: number;
  readonly unitText: string;
}

interface Reading {
  readonly unit: Unit;
  readonly value: number;
  readonly distribution: Distribution;
}

const unsigned = String.raw`(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?`;
/** Of two whole numbers, where a pure number is wanted. */
const fractionPattern = /^([+-]?\d+)\/(\d+)(?![\d.])/;
const vulgarFraction = /(?<![\d.])[¼½¾⅐-⅞]/g;
const numberPattern = new RegExp(`[+-]?${unsigned}`, 'y');
const plusMinus = /\s*(?:±|\+\/-)\s*/;
const rangeWord = /\s+to\s+/;
const logWord = /(?:^|\s+)log$/;
/** What people write for it: no unit is spelled so. */
const logSlip = /(?:^|\s)(\(?(?:LOG|Log|lgo|olg|lg|ln|logs?|log(?:-?u|a|10|e)\w*)\)?)$/;
const logMend = 'Write e.g. `1e5 to 1e9 J/m2/K log`';
const limitPattern = /^<\s*(.*?)\s*\(\s*([^()]*?)\s*%\s*\)$/;
/** Behind the first number: its unit, `+up` with its unit, `-down` with its unit. */
const upAndDown = new RegExp(`^(.*?)\\s*\\+(${unsigned})(?:\\s*|\\s*(\\S.*?)\\s+)-(${unsigned}.*)$`);
const longestText = 200;

/**
 * A quantity from text (or from a plain number, where the key takes pure numbers).
 * Shape:  `0.48 au`, `0.62 ± 0.03`, `0.62 +/- 0.03`, `0.62 +0.03 -0.05`, `0.1 to 0.5`, `1e5 to 1e9 J/m2/K log`,
 *         `< 0.12 (95%)`, `isotropic`; a pure number also as a fraction, `1/4` or `¼`. One unit at the end serves every number, or each has its own.
 * Units:  any of the table → SI. The spread of a temperature is a difference: `10 ± 2 degC` has sigma 2 K.
 * Centre: as written; a range's midpoint, geometric with `log`; a limit's median; isotropic π/2.
 * Errors: SimError at `spec.dimension`: no number, no unit or a wrong one, out of bounds, an empty spread, not finite.
 */
export function parseQuantity(input: string | number, spec: QuantitySpec): Quantity {
  try {
    const text = typeof input === 'number' ? String(input) : input.trim();
    const { unit, value, distribution } = read(text, spec);
    if (distribution.form !== 'exact' && spec.spread === false) {
      throw fault(`\`${text}\` is uncertain`, 'Write a single value here');
    }
    return { text, unit: unit.symbol, value, distribution };
  } catch (error) {
    if (!(error instanceof SimError)) throw error;
    throw new SimError(spec.dimension, error.what, error.mend, error);
  }
}

function fault(what: string, mend: string): SimError {
  return new SimError('quantity', what, mend);
}

function read(text: string, spec: QuantitySpec): Reading {
  if (text.length > longestText)
    throw fault(`the text is ${text.length} characters long`, 'Write a number and its unit');
  const typed = text.replace(/−/g, '-').replace(/\s+/g, ' ');
  const plain = spec.dimension === 'number' ? typed.replace(vulgarFraction, spelledFraction) : typed;
  if (plain === 'isotropic') return readIsotropic(spec);
  if (plain.startsWith('<')) return readLimit(plain, spec);
  if (/^[>≥]/.test(plain)) throw lowerLimit(plain, spec);
  const sides = plain.split(plusMinus);
  if (sides.length > 1) return readNormal(sides, plain, spec);
  const ends = plain.split(rangeWord);
  if (ends.length > 1) return readRange(ends, plain, spec);
  if (logWord.test(plain)) throw fault('`log` belongs to a range', logMend);
  numberPattern.lastIndex = 0;
  const start = numberPattern.exec(plain)?.[0] ?? '';
  const split = start === '' ? null : upAndDown.exec(plain.slice(start.length));
  if (split) return readSplitNormal(start, split, spec);
  return readExact(plain, spec);
}

/** No distribution follows from it: nothing says how large the number may be. */
function lowerLimit(plain: string, spec: QuantitySpec): SimError {
  const what = `\`${plain}\` is a lower limit, which leaves open how large it may be`;
  return fault(what, `Write a range with both ends, e.g. \`${sample('to ', spec)}\``);
}

/** `¼` → `1/4`. */
function spelledFraction(sign: string): string {
  return sign.normalize('NFKD').replace('⁄', '/');
}

function readExact(plain: string, spec: QuantitySpec): Reading {
  const piece = readPiece(plain, spec);
  const [unit] = resolveUnits([piece], plain, spec);
  return { unit: unit!, value: boundedSi(piece, unit!, spec), distribution: { form: 'exact' } };
}

function readNormal(sides: readonly string[], plain: string, spec: QuantitySpec): Reading {
  if (sides.length > 2) throw fault(`\`${plain}\` has more than one spread`, `Write e.g. \`${sample('± ', spec)}\``);
  const pieces = sides.map((side) => readPiece(side, spec));
  const [unit, spreadUnit] = resolveUnits(pieces, plain, spec);
  const sigma = spreadSi(pieces[1]!, spreadUnit!, plain);
  return { unit: unit!, value: boundedSi(pieces[0]!, unit!, spec), distribution: { form: 'normal', sigma } };
}

function readSplitNormal(start: string, split: RegExpExecArray, spec: QuantitySpec): Reading {
  const [behind, unitText, up, upUnit = '', down] = split;
  const plain = start + behind;
  const pieces = [readPiece(start + unitText, spec), readPiece(`${up} ${upUnit}`, spec), readPiece(down!, spec)];
  const [unit, unitUp, unitDown] = resolveUnits(pieces, plain, spec);
  const distribution: Distribution = {
    form: 'splitNormal',
    up: spreadSi(pieces[1]!, unitUp!, plain),
    down: spreadSi(pieces[2]!, unitDown!, plain),
  };
  return { unit: unit!, value: boundedSi(pieces[0]!, unit!, spec), distribution };
}

function readRange(ends: readonly string[], plain: string, spec: QuantitySpec): Reading {
  if (ends.length > 2) throw fault(`\`${plain}\` has more than two ends`, `Write e.g. \`${sample('to ', spec)}\``);
  const isLog = logWord.test(ends[1]!);
  const [, slip] = logSlip.exec(isLog ? '' : ends[1]!) ?? [];
  if (slip !== undefined) {
    throw fault(`\`${slip}\` at the end of \`${plain}\` is no unit and not \`log\``, logMend);
  }
  const pieces = [readPiece(ends[0]!, spec), readPiece(ends[1]!.replace(logWord, ''), spec)];
  const [unit, highUnit] = resolveUnits(pieces, plain, spec);
  const low = boundedSi(pieces[0]!, unit!, spec);
  const high = boundedSi(pieces[1]!, highUnit!, spec);
  if (!(low < high)) throw fault(`\`${plain}\` does not rise`, 'Write the smaller number first');
  if (isLog && !(low > 0)) throw fault(`\`${plain}\` does not start above zero`, 'Start a log range above zero');
  const value = isLog ? Math.sqrt(low) * Math.sqrt(high) : low / 2 + high / 2;
  return { unit: unit!, value, distribution: { form: isLog ? 'logUniform' : 'uniform', low, high } };
}

function readLimit(plain: string, spec: QuantitySpec): Reading {
  const match = limitPattern.exec(plain);
  if (!match) throw fault(`\`${plain}\` does not say how sure it is`, 'Write a limit as in `< 0.12 (95%)`');
  const piece = readPiece(match[1]!, spec);
  const confidence = readNumber(match[2]!, spec).value / 100;
  if (!(confidence > 0 && confidence < 1)) {
    throw fault(`a confidence of ${match[2]}% is impossible`, 'Write one between 0% and 100%');
  }
  const [unit] = resolveUnits([piece], plain, spec);
  if (unit!.offset !== 0)
    throw fault(`a limit in ${unit!.symbol} has no natural zero`, 'Write a range, or the limit in K');
  const limit = boundedSi(piece, unit!, spec);
  if (!(limit > 0)) throw fault(`the limit in \`${plain}\` is not above zero`, 'Write a positive limit');
  // A half-normal's quantile q lies at normalQuantile((1 + q) / 2) of its scale.
  const value = (limit * normalQuantile(0.75)) / normalQuantile((1 + confidence) / 2);
  if (!(value > 0 && Number.isFinite(value))) {
    throw fault(`the limit in \`${plain}\` has no usable median`, 'Write a range instead');
  }
  checkBounds(value, unit!, `the median of ${plain}`, spec);
  return { unit: unit!, value, distribution: { form: 'upperLimit', limit, confidence } };
}

function readIsotropic(spec: QuantitySpec): Reading {
  if (!spec.isotropic) {
    throw fault('`isotropic` is for the direction of an axis', `Write e.g. \`${example(0, spec)}\``);
  }
  return { unit: unitByName.get('deg')!, value: Math.PI / 2, distribution: { form: 'isotropic' } };
}

function readPiece(text: string, spec: QuantitySpec): Piece {
  const { value, length } = readNumber(text, spec);
  const unitText = text.slice(length).trim();
  if (/^[×x*] ?10/.test(unitText)) {
    throw fault(`\`${text}\` has a power of ten written out`, 'Write it as in `4e7`');
  }
  if (/^[+(-]/.test(unitText)) {
    throw fault(`\`${text}\` has more than a number and a unit`, 'Write a spread as `± 0.03` or `+0.03 -0.05`');
  }
  if (/^[\d.]/.test(unitText)) {
    throw fault(`\`${text}\` has two numbers side by side`, 'Write one number with a decimal point, as in `1234.5`');
  }
  return { text, value, unitText };
}

function readNumber(text: string, spec: QuantitySpec): { value: number; length: number } {
  if (text === '') throw fault('a number is missing', `Write e.g. \`${example(0, spec)}\``);
  if (text.includes(',')) throw fault(`\`${text}\` has a comma`, 'Write a decimal point and no thousands separator');
  const fraction = spec.dimension === 'number' ? fractionPattern.exec(text) : null;
  if (fraction) return { value: fractionValue(fraction), length: fraction[0].length };
  numberPattern.lastIndex = 0;
  const number = numberPattern.exec(text)?.[0];
  if (number === undefined) throw fault(`\`${text}\` is not a number`, `Write e.g. \`${example(0, spec)}\``);
  const value = Number(number);
  if (!Number.isFinite(value)) throw fault(`\`${number}\` is not a finite number`, 'Write a smaller one');
  return { value, length: number.length };
}

function fractionValue([text, above, below]: RegExpExecArray): number {
  const value = Number(above) / Number(below);
  if (!Number.isFinite(value)) throw fault(`\`${text}\` is not a finite number`, 'Divide by another number than zero');
  return value;
}

/** The unit of each piece: its own, or the one at the end for all. */
function resolveUnits(pieces: readonly Piece[], plain: string, spec: QuantitySpec): Unit[] {
  const shared = pieces.at(-1)!.unitText;
  const withoutUnit = pieces.filter((piece) => piece.unitText === '').length;
  if (withoutUnit === pieces.length) return pieces.map(() => unitOfNothing(pieces[0]!, spec));
  if (withoutUnit > 0 && (shared === '' || withoutUnit < pieces.length - 1)) {
    throw fault(`\`${plain}\` has a unit on some numbers only`, 'Write one unit at the end, or one behind each number');
  }
  return pieces.map((piece) => {
    const unit = parseUnit(piece.unitText || shared, spec.dimension);
    checkDimension(piece, unit, spec);
    return unit;
  });
}

function unitOfNothing(piece: Piece, spec: QuantitySpec): Unit {
  if (spec.dimension === 'number') return unitByName.get('1')!;
  const examples = dimensions[spec.dimension].units.slice(0, 2).map((unit) => `\`${piece.text} ${unit}\``);
  throw fault(`\`${piece.text}\` has no unit`, `Write e.g. ${examples.join(' or ')}`);
}

function checkDimension(piece: Piece, unit: Unit, spec: QuantitySpec): void {
  const { exponents, phrase } = dimensions[spec.dimension];
  if (sameDimension(unit.dimension, exponents)) return;
  const shown = piece.unitText === '' ? `${piece.text} ${unit.symbol}` : piece.text;
  const found = describeDimension(unit.dimension);
  throw fault(`\`${shown}\` is ${found}, not ${phrase}`, `Write e.g. \`${example(piece.value, spec)}\``);
}

/** Text with a unit (or none) that this key would take. */
function example(value: number, spec: QuantitySpec): string {
  const number = value === 0 ? '0.3' : String(value);
  return spec.dimension === 'number' ? number : `${number} ${dimensions[spec.dimension].units[0]}`;
}

function sample(joint: string, spec: QuantitySpec): string {
  return `0.3 ${joint}${example(joint === 'to ' ? 0.5 : 0.1, spec)}`;
}

function boundedSi(piece: Piece, unit: Unit, spec: QuantitySpec): number {
  const si = toSi(piece.value, unit);
  const shown = piece.unitText === '' && unit.symbol !== '1' ? `${piece.text} ${unit.symbol}` : piece.text;
  if (!Number.isFinite(si)) throw fault(`\`${shown}\` is too large to compute with`, 'Write a smaller number');
  checkBounds(si, unit, `\`${shown}\``, spec);
  return si;
}

function spreadSi(piece: Piece, unit: Unit, plain: string): number {
  const si = differenceToSi(piece.value, unit);
  if (si > 0 && Number.isFinite(si)) return si;
  throw fault(`the spread in \`${plain}\` is not above zero`, 'Write a positive spread, or leave it out');
}

/** Throws what `parseQuantity` throws for a number outside the bounds of its key. */
export function checkBounds(si: number, unit: Unit, shown: string, spec: QuantitySpec): void {
  if (isWithin(si, spec)) return;
  if (spec.dimension === 'temperature' && si < 0) {
    throw fault(`${shown} is below absolute zero`, 'Write a temperature above 0 K');
  }
  const { above = spec.positive ? 0 : undefined, below, min, max } = spec;
  const bounds = Object.entries({ above, 'at least': min, below, 'at most': max });
  const words = bounds.flatMap(([word, bound]) =>
    bound === undefined ? [] : [`${word} ${formatQuantity(bound, unit)}`],
  );
  throw fault(`${shown} is out of bounds`, `Keep it ${words.join(' and ')}`);
}

/** Whether a key takes this number, SI. */
export function isWithin(si: number, spec: QuantitySpec): boolean {
  const { above, below, min, max } = spec;
  if (spec.dimension === 'temperature' && si < 0) return false;
  if (spec.positive && above === undefined && !(si > 0)) return false;
  return (
    (above === undefined || si > above) &&
    (min === undefined || si >= min) &&
    (below === undefined || si < below) &&
    (max === undefined || si <= max)
  );
}
