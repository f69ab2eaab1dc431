/** Ranges as people write them elsewhere, and how they are written here. */

const number = String.raw`[-−]?(?:\d+\.?\d*|\.\d+)(?:[eE][-+]?\d+)?`;
/** `0-0.9`, `0..0.9`, `0:0.9`, `0, 0.9`, `[0, 0.9] au`. */
const otherSeparator = new RegExp(
  String.raw`^[[(]?\s*(${number})\s*(?:-|–|—|\.\.+|…|:|,|;)\s*(${number})\s*[\])]?(.*)$`,
);
const leadingLog = /^log\w*\s+(.+)$/i;
/** `logarithmic`, `, log`, `(log)` and `LOG`; ` log` alone is right. */
const otherLog = /^(.+?)(?:\s*[,(]\s*log\w*\)?|\s+log\w+|\s+(?!log$)log)$/i;

/** `1e4..1e9 J/m2/K, log` → `1e4 to 1e9 J/m2/K log`; null for a text that is none of these forms. */
export function mendedRange(written: string): string | null {
  const isLog = / log$/.test(written);
  const [, bare] = leadingLog.exec(written) ?? otherLog.exec(written) ?? [];
  const range = bare ?? (isLog ? written.slice(0, -' log'.length) : written);
  const [, from, to, rest = ''] = otherSeparator.exec(range) ?? [];
  if (from === undefined && bare === undefined) return null;
  const mended = from === undefined ? range : `${from} to ${to} ${rest}`.trim().replace(/\s+/g, ' ');
  return bare === undefined && !isLog ? mended : `${mended} log`;
}
