/** Samples as CSV. */
import { SimError } from '../sim/error.ts';
import { csvRecords } from './csvRecords.ts';
import { type RawColumns, requireColumns } from './samplesColumns.ts';

/** Errors: SimError that names file, line and column: no header, no such column, a row of another length, no number. */
export function columnsOfCsv(text: string, file: string, names: readonly string[]): RawColumns {
  const records = csvRecords(text, file);
  const header = records.next();
  if (header.done) throw new SimError(file, 'the file is empty', 'Write a header and one sample a row');
  const { line, fields } = header.value;
  const titles = fields.map((title) => title.trim());
  checkHeader(titles, `${file}:${line}`);
  requireColumns(titles, names, file);
  const places = names.map((name) => ({
    name,
    at: onlyPlace(titles, name, `${file}:${line}`),
    values: [] as number[],
  }));
  const lines: number[] = [];
  for (const record of records) {
    const where = `${file}:${record.line}`;
    if (record.fields.length !== titles.length) {
      const what = `the row has ${count(record.fields.length)} and the header ${count(titles.length)}`;
      throw new SimError(where, what, 'Give each column its value');
    }
    for (const { name, at, values } of places) values.push(numberOf(record.fields[at]!, `${where}: ${name}`));
    lines.push(record.line);
  }
  const columns = new Map(places.map(({ name, values }) => [name, Float64Array.from(values)]));
  return { count: lines.length, columns, placeOf: (row) => `${file}:${lines[row]}` };
}

function count(fields: number): string {
  return `${fields} ${fields === 1 ? 'field' : 'fields'}`;
}

function checkHeader(titles: readonly string[], where: string): void {
  if (titles.every((title) => title !== '' && Number.isFinite(Number(title)))) {
    throw new SimError(where, 'the first row holds numbers', 'Write the names of the columns above them, without #');
  }
  const [only = ''] = titles;
  const other =
    titles.length > 1
      ? null
      : /\t/.test(only)
        ? 'tabs'
        : /;/.test(only)
          ? 'semicolons'
          : /\s/.test(only)
            ? 'spaces'
            : null;
  if (other) throw new SimError(where, `the columns are separated by ${other}`, 'Separate them by commas');
}

function onlyPlace(titles: readonly string[], name: string, where: string): number {
  const at = titles.indexOf(name);
  if (titles.lastIndexOf(name) === at) return at;
  throw new SimError(where, `two columns are called \`${name}\``, 'Give each column a name of its own');
}

/** Words for numbers that are not finite come through, to be told as such. */
function numberOf(field: string, where: string): number {
  const text = field.trim();
  const value = text === '' ? Number.NaN : Number(text);
  if (!Number.isNaN(value) || /^[-+]?nan$/i.test(text)) return value;
  if (/^[-+]?inf(?:inity)?$/i.test(text)) return text.startsWith('-') ? -Infinity : Infinity;
  const what = text === '' ? 'nothing is given' : `\`${text.slice(0, 40)}\` is not a number`;
  throw new SimError(where, what, 'Write a number such as 0.62 or 1.3e7, or leave the row out');
}
