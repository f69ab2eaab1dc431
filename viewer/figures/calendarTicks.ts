/** Ticks that fall on round calendar dates, UTC. Pure; milliseconds since 1970 as `Date` counts them. */

export interface CalendarTick {
  readonly utcMillis: number;
  /** Year first where it helps: `2026 Mar 4`, then `Mar 8`; hours as `06:00`. */
  readonly label: string;
}

const minute = 60_000;
const hour = 60 * minute;
const day = 24 * hour;
const year = 365.2425 * day;
const evenSteps = [1, 2, 5, 10, 15, 30]
  .map((n) => n * minute)
  .concat(
    [1, 2, 3, 6, 12].map((n) => n * hour),
    [1, 2, 4, 8].map((n) => n * day),
  );
const monthSteps = [1, 2, 3, 6];
const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
/** What a `Date` can hold: years −271821 to 275760. */
const lastMillis = 8.64e15;

/** Up to `atMost` ticks in [from, to]; none when the span is empty or leaves the calendar. */
export function calendarTicks(from: number, to: number, atMost: number): CalendarTick[] {
  if (!(to > from) || !(Math.abs(from) <= lastMillis && Math.abs(to) <= lastMillis)) return [];
  const even = evenSteps.find((step) => (to - from) / step <= atMost);
  if (even !== undefined) return labelled(evenTicks(from, to, even), even);
  const step = monthStep(to - from, atMost);
  return labelled(monthTicks(from, to, step), step < 12 ? 30 * day : year);
}

function evenTicks(from: number, to: number, step: number): number[] {
  const first = Math.ceil(from / step);
  const count = Math.floor(to / step) - first + 1;
  return Array.from({ length: Math.max(0, count) }, (_, index) => (first + index) * step);
}

/** Months between ticks: 1, 2, 3, 6, or a round number of years. */
function monthStep(span: number, atMost: number): number {
  const few = monthSteps.find((step) => span / (step * (year / 12)) <= atMost);
  if (few !== undefined) return few;
  const years = span / year / atMost;
  const decade = 10 ** Math.floor(Math.log10(years));
  const rounded = [1, 2, 5, 10].find((lead) => lead * decade >= years)!;
  return 12 * Math.max(1, Math.round(rounded * decade));
}

function monthTicks(from: number, to: number, step: number): number[] {
  const start = new Date(from);
  const ticks: number[] = [];
  const firstMonth = Math.ceil((start.getUTCFullYear() * 12 + start.getUTCMonth()) / step) * step;
  for (let month = firstMonth; ; month += step) {
    const tick = startOfMonth(month);
    if (!(tick <= to)) return ticks;
    if (tick >= from) ticks.push(tick);
  }
}

/** `Date.UTC` reads the years 0–99 as 1900–1999; a set year is taken as it is. */
function startOfMonth(monthsSinceYearZero: number): number {
  const date = new Date(0);
  return date.setUTCFullYear(Math.floor(monthsSinceYearZero / 12), ((monthsSinceYearZero % 12) + 12) % 12, 1);
}

function labelled(ticks: readonly number[], step: number): CalendarTick[] {
  return ticks.map((utcMillis, index) => ({ utcMillis, label: label(utcMillis, ticks[index - 1], step) }));
}

function label(utcMillis: number, before: number | undefined, step: number): string {
  const date = new Date(utcMillis);
  const yearText = String(date.getUTCFullYear()).replace('-', '−');
  if (step >= year) return yearText;
  const month = months[date.getUTCMonth()]!;
  const previous = before === undefined ? null : new Date(before);
  const isNewYear = previous?.getUTCFullYear() !== date.getUTCFullYear();
  if (step >= 30 * day) return isNewYear ? `${yearText} ${month}` : month;
  const dayText = `${isNewYear ? `${yearText} ` : ''}${month} ${date.getUTCDate()}`;
  if (step >= day) return dayText;
  const isNewDay = previous?.getUTCDate() !== date.getUTCDate() || isNewYear;
  return isNewDay ? `${dayText}, ${clock(date)}` : clock(date);
}

function clock(date: Date): string {
  const two = (part: number): string => String(part).padStart(2, '0');
  return `${two(date.getUTCHours())}:${two(date.getUTCMinutes())}`;
}
