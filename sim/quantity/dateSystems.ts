/** Dates as papers write them that do not say enough, or count from elsewhere: what each is, and how to convert it. */

export interface DateAdvice {
  readonly what: string;
  readonly mend: string;
}

const name = String.raw`([BHMRT]*JD|BTJD|BKJD)(?:[_ ]?\(?(?:TDB|UTC|TT|TAI|UT1?)\)?)?`;
const before = new RegExp(String.raw`^${name}\s*(\d+(?:\.\d*)?)$`, 'i');
const behind = new RegExp(String.raw`^(\d+(?:\.\d*)?)\s*${name}$`, 'i');
const otherScale = /(?:^|[^A-Z])(TT|TAI|UT1?|ET|GMT)(?![A-Z])/i;
const bareNumber = /^\d+(?:\.\d*)?(?=[^\d.]|$)/;

/** What was taken off a Julian date; and on which clock it counts, where its name says so. */
const offsets: Readonly<
  Record<string, { readonly days: string; readonly value: number; readonly scale: string | null }>
> = {
  MJD: { days: '2400000.5', value: 2_400_000.5, scale: null },
  BMJD: { days: '2400000.5', value: 2_400_000.5, scale: null },
  RJD: { days: '2400000', value: 2_400_000, scale: null },
  BTJD: { days: '2457000', value: 2_457_000, scale: 'TDB' }, // TESS data are counted so
  BKJD: { days: '2454833', value: 2_454_833, scale: 'TDB' }, // Kepler data are counted so
};

/** Advice on a date that was not read; null where nothing is known of its form. `scale`: TDB or UTC where it stands beside. */
export function dateAdvice(text: string, scale: string | null): DateAdvice | null {
  const front = before.exec(text);
  const back = front ? null : behind.exec(text);
  const system = (front?.[1] ?? back?.[2])?.toUpperCase();
  const number = front?.[2] ?? back?.[1];
  if (system === undefined || number === undefined) return scaleAdvice(text, bareNumber.exec(text)?.[0]);
  const clock = scale ?? /TDB|UTC/i.exec(text)?.[0].toUpperCase() ?? null;
  if (system === 'HJD') return heliocentric(text, number, clock);
  const offset = offsets[system];
  if (offset) {
    const what = `\`${text}\` is a Julian date less ${offset.days}`;
    return { what, mend: `Add ${offset.days} and write ${either(sum(number, offset.value), clock ?? offset.scale)}` };
  }
  if (clock !== null || !/^B?JD$/.test(system)) return null;
  if (otherScale.test(text)) return scaleAdvice(text, number);
  return {
    what: `\`${text}\` has no time scale`,
    mend: `Write ${either(number, null)}; papers on planets mostly mean TDB`,
  };
}

/** Source: Eastman, Siverd & Gaudi (2010) PASP 122, 935: HJD and BJD on one clock differ by up to 4 s. */
function heliocentric(text: string, number: string, clock: string | null): DateAdvice {
  return {
    what: `\`${text}\` is heliocentric: light travel, up to 8.3 minutes, is taken out to the Sun; most are in UTC`,
    mend: `Convert it to BJD_TDB, or write ${either(number, clock)}, which is within 4 s of it where the clock is right`,
  };
}

function scaleAdvice(text: string, number: string | undefined): DateAdvice | null {
  const word = otherScale.exec(text)?.[1]?.toUpperCase();
  if (word === undefined || number === undefined) return null;
  const what = `the time scale ${word} is not used here`;
  if (word === 'TT' || word === 'ET') return { what, mend: `Write \`${number} TDB\`, which differs by less than 2 ms` };
  if (word === 'TAI') return { what, mend: 'Add 32.184 s and write TDB' };
  return { what, mend: `Write \`${number} UTC\`, which differs by less than 1 s` };
}

function either(number: string, clock: string | null): string {
  return clock === null ? `\`${number} TDB\` or \`${number} UTC\`` : `\`${number} ${clock}\``;
}

/** With the decimals of what was typed, and at least one where the offset has one. */
function sum(number: string, offset: number): string {
  const decimals = Math.max(/\.(\d*)$/.exec(number)?.[1]?.length ?? 0, Number.isInteger(offset) ? 0 : 1);
  return (Number(number) + offset).toFixed(Math.min(decimals, 8));
}
