/** `--figures svg,png` and what belongs to it, read before anything is computed. */
import { SimError } from '../../sim/error.ts';
import { parseQuantity } from '../../sim/quantity/index.ts';
import type { Io } from '../io.ts';
import { namedBrowser } from './browser.ts';

/** As Commander hands them over. */
export interface FigureOptions {
  readonly figures?: string;
  readonly figureWidth?: string;
  readonly browser?: string;
}

const formats = ['svg', 'png'] as const;
export type FigureFormat = (typeof formats)[number];

export interface FigureRequest {
  readonly formats: readonly FigureFormat[];
  readonly widthMm: number;
  /** Path of the browser that the user named; null to look for one. */
  readonly browser: string | null;
}

const defaultWidthMm = 180;
/** From the column of a small journal to a poster. */
const widthLimitsMm = [40, 600] as const;
const millimetresPerInch = 25.4;

/** Null where no figures are asked for. Errors: SimError at the option: another format, a width that is none, no such browser. */
export function figureRequest({ figures, figureWidth, browser }: FigureOptions, io: Io): FigureRequest | null {
  if (figures === undefined) {
    const idle = figureWidth !== undefined ? '--figure-width' : browser !== undefined ? '--browser' : null;
    if (idle !== null) throw new SimError(idle, 'no figures are asked for', 'Add e.g. `--figures svg,png`');
    return null;
  }
  return {
    formats: formatsOf(figures),
    widthMm: figureWidth === undefined ? defaultWidthMm : widthOf(figureWidth),
    browser: namedBrowser(browser, io),
  };
}

function formatsOf(text: string): FigureFormat[] {
  const words = text.split(',').map((word) => word.trim().toLowerCase());
  const odd = words.find((word) => !formats.includes(word as FigureFormat));
  if (odd === undefined) return formats.filter((format) => words.includes(format));
  const what = odd === '' ? 'a format is missing' : `\`${odd}\` is no format in which figures are written`;
  throw new SimError('--figures', what, 'Write svg, png, or both: `--figures svg,png`');
}

/** mm. Inches are for paper only: no scenario knows them. */
function widthOf(text: string): number {
  const [, inches] = /^\s*([\d.]+)\s*in(?:ch|ches)?\s*$/.exec(text) ?? [];
  const widthMm = inches === undefined ? 1000 * metres(text) : millimetresPerInch * Number(inches);
  const [least, most] = widthLimitsMm;
  if (widthMm >= least && widthMm <= most) return widthMm;
  throw widthFault(`\`${text}\` is not between ${least} mm and ${most} mm`);
}

function metres(text: string): number {
  try {
    return parseQuantity(text, { dimension: 'length', positive: true, spread: false }).value;
  } catch (error) {
    if (!(error instanceof SimError)) throw error;
    throw widthFault(error.what, error);
  }
}

function widthFault(what: string, cause?: unknown): SimError {
  return new SimError('--figure-width', what, "Write a width with its unit, e.g. '180 mm', '9 cm' or '7 in'", cause);
}
