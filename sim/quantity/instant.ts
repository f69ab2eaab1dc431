/** Reads a moment: an ISO 8601 date in UTC, or a Julian date that names its time scale. */
import { secondsPerDay } from '../constants.ts';
import { SimError } from '../error.ts';
import type { Seconds, TdbSeconds } from '../si.ts';
import { isoText, readCalendarDate } from './calendar.ts';
import { dateAdvice } from './dateSystems.ts';
import { parseQuantity } from './parse.ts';
import { endsLeapSecond, tdbFromTt, tdbMinusTt, ttFromUtc, utcFromTtRounded } from './timeScale.ts';
import type { Distribution } from './types.ts';

export type TimeScale = 'UTC' | 'TDB';

export interface Instant {
  /** As the user typed it. */
  readonly text: string;
  /** Centre. */
  readonly tdbSeconds: TdbSeconds;
  /** The scale in which it was written. */
  readonly scale: TimeScale;
  /** In seconds; the ends of a range are TDB seconds. */
  readonly distribution: Distribution;
}

/** Julian date of J2000.0. */
const julianDateOfJ2000 = 2_451_545;
/** Years 0000 to 9999, the reach of an ISO 8601 date. */
const firstJulianDate = 1_721_059.5;
const lastJulianDate = 5_373_484.5;

/** `TDB` or `UTC`, alone or as papers join it: `BJD_TDB`, `BJD(TDB)`, `JD UTC`. */
const scaleWord = /\s+(?:B?JD[_ ]?)?\(?(TDB|UTC)\)?(?=\s|$)/gi;
const julianPrefix = /^B?JD(?:[_ ]?\(?(TDB|UTC)\)?)?\s*(?=\d)/i;
const julianNumber = /^\d+(?:\.\d*)?$/;
const bareNumber = /^\d*\.?\d+(?:[eE][+-]?\d+)?$/;
const plusMinus = /\s*(?:±|\+\/-)\s*/;
const rangeWord = /\s+to\s+/;
const duration = String.raw`\d*\.?\d+(?:[eE][+-]?\d+)?(?: ?[a-z]+)?`;
const upAndDown = new RegExp(`^(.+?)\\s+\\+(${duration})\\s*-(${duration})$`);
const longestText = 200;
const advice = 'Write e.g. `2026-03-04T05:00Z` or `2461103.71 TDB`';

/**
 * A moment from text.
 * Shape:  `2026-03-04T05:00Z` (seconds, fractions and an offset such as +01:00 are welcome; a date alone is 0 h UTC),
 *         `2461103.71 TDB`, `2461103.71 UTC`, `JD 2461103.71 TDB`, `BJD_TDB 2461103.71`, `2461103.71 BJD_TDB`; with a spread that is a duration:
 *         `2461103.71 ± 0.002 d TDB`, `2461103.71 TDB ± 0.002 d`, `… +0.003 -0.002 d`; or two moments with `to` between.
 * Units:  → TDB seconds since J2000.0. A double holds a Julian date to 0.04 ms.
 * Errors: SimError at `date`: another form, no scale, no zone, a day that does not exist, years outside 0000–9999.
 * Caution: a date is taken as it stands. No light travel time is added or removed: a barycentric date differs from the
 *         time of an observer on Earth by up to 8.4 minutes. A UTC Julian date counts every day as 86400 s, so it is
 *         unsure by a second on a day with a leap second. Before 1972 and after today see `timeScale.ts`.
 */
export function parseInstant(text: string): Instant {
  if (text.length > longestText) throw fault(`the text is ${text.length} characters long`, advice);
  const plain = text.trim().replace(/−/g, '-').replace(/\s+/g, ' ');
  const ends = plain.split(rangeWord);
  if (ends.length > 1) return { text: text.trim(), ...readRange(ends, plain) };
  const { body, scale } = takeScale(plain);
  const sides = body.split(plusMinus);
  if (sides.length > 2) throw fault(`\`${plain}\` has more than one spread`, 'Write one, e.g. `± 0.002 d`');
  const split = upAndDown.exec(body);
  const centre = split?.[1] ?? sides[0]!;
  const moment = readMoment(centre, scale, plain);
  return { text: text.trim(), ...moment, distribution: readSpread(sides[1], split, { text: centre, scale }) };
}

/**
 * ISO 8601 in UTC, to the nearest second: `2026-03-04T05:00:00Z`.
 * Units:  TDB seconds since J2000.0 → text. A leap second shows as `23:59:60Z`.
 * Errors: RangeError for a number that is not finite or some 270 000 years away.
 */
export function formatInstantUtc(tdbSeconds: TdbSeconds): string {
  return isoText(utcFromTtRounded(tdbSeconds - tdbMinusTt(tdbSeconds)));
}

/** Julian date in TDB. Units: TDB seconds since J2000.0 → d. */
export function julianDateTdb(tdbSeconds: TdbSeconds): number {
  return julianDateOfJ2000 + tdbSeconds / secondsPerDay;
}

interface Moment {
  readonly tdbSeconds: TdbSeconds;
  readonly scale: TimeScale;
}

function fault(what: string, mend: string): SimError {
  return new SimError('date', what, mend);
}

function readRange(ends: readonly string[], plain: string): Moment & { distribution: Distribution } {
  if (ends.length > 2) throw fault(`\`${plain}\` has more than two ends`, 'Write one range');
  const [first, last] = ends.map(takeScale);
  const low = readMoment(first!.body, first!.scale ?? last!.scale, plain);
  const high = readMoment(last!.body, last!.scale, plain);
  if (!(low.tdbSeconds < high.tdbSeconds)) throw fault(`\`${plain}\` does not rise`, 'Write the earlier date first');
  return {
    tdbSeconds: low.tdbSeconds / 2 + high.tdbSeconds / 2,
    scale: low.scale,
    distribution: { form: 'uniform', low: low.tdbSeconds, high: high.tdbSeconds },
  };
}

/** Takes the word TDB or UTC out, wherever it stands. */
function takeScale(text: string): { body: string; scale: TimeScale | null } {
  const words = [...text.matchAll(scaleWord)].map((match) => match[1]!.toUpperCase() as TimeScale);
  if (words.length > 1) throw fault(`\`${text}\` names two time scales`, 'Write TDB or UTC once');
  return { body: text.replace(scaleWord, ''), scale: words[0] ?? null };
}

function readMoment(text: string, scale: TimeScale | null, whole: string): Moment {
  const date = readCalendarDate(text);
  if (!date) return readJulianDate(text, scale, whole);
  if (date.hasZone && scale === 'TDB') throw fault(`\`${whole}\` names two time scales`, 'Drop TDB, or the zone');
  if (date.hasTime && !date.hasZone && scale === null) {
    throw fault(`\`${text}\` has no time zone`, `Add Z for UTC: \`${text}Z\``);
  }
  if (date.isLeapSecond && (scale === 'TDB' || !endsLeapSecond(date.seconds))) {
    throw fault(`\`${text}\` is not a leap second`, 'Write seconds below 60');
  }
  if (scale === 'TDB') return { tdbSeconds: date.seconds + date.fraction, scale };
  const { seconds, fraction } = date;
  // Within a leap second the clock before it still counts: the second before, plus one.
  const tt = date.isLeapSecond ? ttFromUtc(seconds - 1) + 1 + fraction : ttFromUtc(seconds + fraction);
  return { tdbSeconds: tdbFromTt(tt), scale: 'UTC' };
}

function readJulianDate(text: string, word: TimeScale | null, whole: string): Moment {
  const prefix = julianPrefix.exec(text);
  const number = text.slice(prefix?.[0].length ?? 0);
  if (!julianNumber.test(number)) {
    const known = dateAdvice(text, word);
    throw known ? fault(known.what, known.mend) : fault(`\`${text}\` is not a date`, advice);
  }
  const named = (prefix?.[1]?.toUpperCase() as TimeScale | undefined) ?? null;
  if (named && word && named !== word) throw fault(`\`${whole}\` names two time scales`, 'Write TDB or UTC once');
  const scale = named ?? word;
  if (scale === null) throw fault(`\`${text}\` has no time scale`, `Write \`${number} TDB\` or \`${number} UTC\``);
  const julianDate = Number(number);
  if (!(julianDate >= firstJulianDate && julianDate < lastJulianDate)) {
    throw fault(`\`${text}\` is outside the years 0000 to 9999`, 'Write the full Julian date, e.g. `2461103.71 TDB`');
  }
  const seconds = (julianDate - julianDateOfJ2000) * secondsPerDay;
  return { tdbSeconds: scale === 'TDB' ? seconds : tdbFromTt(ttFromUtc(seconds)), scale };
}

function readSpread(symmetric: string | undefined, split: RegExpExecArray | null, shown: ShownMoment): Distribution {
  if (symmetric !== undefined && bareNumber.test(symmetric)) throw noDuration(`± ${symmetric}`, shown);
  if (split && bareNumber.test(split[2]!) && bareNumber.test(split[3]!)) {
    throw noDuration(`+${split[2]} -${split[3]}`, shown);
  }
  if (symmetric !== undefined) return { form: 'normal', sigma: readDuration(symmetric) };
  if (!split) return { form: 'exact' };
  const down = split[3]!;
  const up = /[a-z]$/.test(split[2]!) ? split[2]! : `${split[2]} ${/[a-z]+$/.exec(down)?.[0] ?? ''}`.trim();
  return { form: 'splitNormal', up: readDuration(up), down: readDuration(down) };
}

interface ShownMoment {
  readonly text: string;
  /** As it stood behind the spread. */
  readonly scale: TimeScale | null;
}

/** Days are what papers mean, and the whole is shown as it should be written. */
function noDuration(spread: string, { text, scale }: ShownMoment): SimError {
  const whole = [text, spread, 'd', scale].filter((part) => part !== null).join(' ');
  return fault(`the spread \`${spread}\` of a date has no unit`, `Write e.g. \`${whole}\``);
}

function readDuration(text: string): Seconds {
  try {
    return parseQuantity(text, { dimension: 'time', positive: true, spread: false }).value;
  } catch (error) {
    if (!(error instanceof SimError)) throw error;
    throw fault(`the spread of a date is a duration: ${error.what}`, error.mend);
  }
}
