/** The numbers as a LaTeX table that needs no package. Pure. */
import { columnName } from './columns.ts';
import { absences, type NumberCell, type NumberRow, type NumbersTable } from './numbersTable.ts';

/** What LaTeX reads as something else, and what older ones cannot set. Brackets and stars would be options behind a line's end. */
const signs: Readonly<Record<string, string>> = {
  '\\': '\\textbackslash{}',
  '{': '\\{',
  '}': '\\}',
  $: '\\$',
  '&': '\\&',
  '#': '\\#',
  _: '\\_',
  '%': '\\%',
  '~': '\\textasciitilde{}',
  '^': '\\textasciicircum{}',
  '<': '\\textless{}',
  '>': '\\textgreater{}',
  '|': '\\textbar{}',
  '"': '\\char34{}',
  '[': '{[}',
  ']': '{]}',
  '*': '{*}',
  '°': '$^{\\circ}$',
  '±': '$\\pm$',
  '×': '$\\times$',
  '−': '$-$',
  '–': '{--}',
  '—': '{---}',
  '“': '{``}',
  '”': "{''}",
  '‘': '{`}',
  '’': "{'}",
  '…': '\\ldots{}',
  '\u00a0': '~',
};
const raised = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** Any text as LaTeX sets it: on one line, every special character as itself, no two characters drawn as one. */
export function latexText(text: string): string {
  const clean = text.replace(/\s/g, (blank) => (blank === '\u00a0' ? blank : ' ')).replace(/\p{C}/gu, '');
  const pieces = clean.match(/⁻?[⁰¹²³⁴⁵⁶⁷⁸⁹]+|./gsu) ?? [];
  return pieces.map((piece, at) => `${setPiece(piece)}${joins(piece, pieces[at + 1]) ? '{}' : ''}`).join('');
}

function setPiece(piece: string): string {
  if (!/[⁰¹²³⁴⁵⁶⁷⁸⁹]$/u.test(piece)) return signs[piece] ?? piece;
  const power = [...piece].map((digit) => (digit === '⁻' ? '-' : raised.indexOf(digit))).join('');
  return `$^{${power}}$`;
}

/** `--`, `''`, `` ?` `` and their like would become one sign. */
function joins(piece: string, next: string | undefined): boolean {
  return ("-'`,".includes(piece) && piece === next) || ('?!'.includes(piece) && next === '`');
}

/** Rows of quantities, a column for each case and state. `version` is the program's. */
export function latexTable(table: NumbersTable, version: string): string {
  const { columns, groups } = table;
  const line = (cells: readonly string[]): string => `${cells.join(' & ')} \\\\`;
  const width = columns.length + 1;
  const body = groups.flatMap(({ title, rows }) => [
    `\\multicolumn{${width}}{l}{\\textbf{${latexText(title)}}} \\\\`,
    ...rows.map((row) => line([rowLabel(row), ...row.cells.map(number)])),
  ]);
  const missing = absences(table).map((sentence) => `\\par ${latexText(sentence)}`);
  return [
    `% Numbers computed by perilag ${version.replace(/[^\w.+-]/g, '')}. The plus-minus is the numerical error, where it reaches the last digit.`,
    '% A plain tabular: no package is needed. Names in other than Latin letters need LuaLaTeX or XeLaTeX.',
    `\\begin{tabular}{l${'r'.repeat(columns.length)}}`,
    '\\hline',
    line(['Quantity', ...columns.map((column) => latexText(columnName(column)))]),
    '\\hline',
    ...body,
    '\\hline',
    '\\end{tabular}',
    ...missing,
    '',
  ].join('\n');
}

/** The unit in upright letters, its powers raised. */
function rowLabel({ label, symbol }: NumberRow): string {
  return symbol === '' ? latexText(label) : `${latexText(label)} (${latexText(symbol).replaceAll('~', '\\,')})`;
}

function number({ shown }: NumberCell): string {
  if (shown === null) return '---';
  const { digits, error, power } = shown;
  const plain = error === null ? digits : `${digits} \\pm ${error}`;
  if (power === 0) return `$${plain}$`;
  return `$${error === null ? plain : `(${plain})`} \\times 10^{${power}}$`;
}
