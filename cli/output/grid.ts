/** Lays out a table of texts for a terminal: labels at the left, columns beside, in as many panels as the width asks for. */
import type { Terminal } from './terminal.ts';
import { padEnd, padStart, textWidth, wrap } from './text.ts';

const gap = 2;
const indent = '  ';
const widestLabel = 36;
/** A heading up to this width stays on one line; beyond, a long word may ask for a little more. */
const headingWidth = 12;
const widestHeading = 16;

/** Texts as the terminal can show them; `cells[row][column]`. */
export interface Grid {
  readonly headings: readonly string[];
  readonly rows: readonly GridRow[];
  readonly cells: readonly (readonly string[])[];
}

export interface GridRow {
  readonly section: string;
  /** Under its section; empty where the section says it all. */
  readonly label: string;
  /** Its name where it stands alone. */
  readonly alone: string;
}

/** Rows as columns: what stood side by side stands one below the other. */
export function transposed({ headings, rows, cells }: Grid): Grid {
  return {
    headings: rows.map(({ alone }) => alone),
    rows: headings.map((heading) => ({ section: heading, label: '', alone: heading })),
    cells: headings.map((_, column) => cells.map((row) => row[column]!)),
  };
}

/** Lines of each panel, none wider than the terminal; cells are never cut. A row that says nothing in a panel is left out of it. */
export function panels(grid: Grid, terminal: Terminal): string[][] {
  const widths = grid.headings.map((heading, column) => columnWidth(heading, columnOf(grid, column)));
  const labels = Math.min(widestLabel, labelWidth(grid), terminal.width - gap - Math.max(...widths));
  return groups(widths, terminal.width - labels).map((chosen) =>
    panelLines(grid, { chosen, widths, labels }, terminal),
  );
}

function columnOf({ cells }: Grid, column: number): string[] {
  return cells.map((row) => row[column]!);
}

/** As the cells need; a heading may ask for a little more before it wraps. */
function columnWidth(heading: string, cells: readonly string[]): number {
  const longestWord = Math.max(...heading.split(' ').map(textWidth));
  const wanted = Math.max(Math.min(textWidth(heading), headingWidth), Math.min(longestWord, widestHeading));
  return Math.max(wanted, ...cells.map(textWidth));
}

function labelWidth({ rows }: Grid): number {
  return Math.max(...rows.map(({ section, label }) => textWidth(label === '' ? section : indent + label)));
}

/** Consecutive columns, as many in a group as fit; at least one. */
function groups(widths: readonly number[], room: number): number[][] {
  const out: number[][] = [];
  let left = 0;
  for (const [column, width] of widths.entries()) {
    if (out.length === 0 || left < width + gap) {
      out.push([]);
      left = room;
    }
    out[out.length - 1]!.push(column);
    left -= width + gap;
  }
  return out;
}

interface Panel {
  readonly chosen: readonly number[];
  readonly widths: readonly number[];
  readonly labels: number;
}

function panelLines(grid: Grid, panel: Panel, terminal: Terminal): string[] {
  const { chosen, widths, labels } = panel;
  const headings = standing(chosen.map((column) => wrap(grid.headings[column]!, widths[column]!)));
  const filled = grid.rows
    .map((row, index) => ({ row, texts: chosen.map((column) => grid.cells[index]![column]!) }))
    .filter(({ texts }) => texts.some((text) => text !== ''));
  const total = chosen.reduce((sum, column) => sum + gap + widths[column]!, labels);
  return [
    ...headings.map((texts) => terminal.paint('bold', lineOf('', texts, panel))),
    terminal.paint('dim', (terminal.unicode ? '─' : '-').repeat(total)),
    ...filled.flatMap(({ row, texts }, index) => {
      const isNew = row.section !== filled[index - 1]?.row.section && row.label !== '';
      const section = isNew ? wrap(row.section, terminal.width) : [];
      return [...section.map((text) => terminal.paint('dim', text)), ...rowLines(row, texts, panel)];
    }),
  ];
}

/** A row whose label may take several lines; the cells stand on the last. */
function rowLines({ section, label }: GridRow, texts: readonly string[], panel: Panel): string[] {
  const inset = label === '' ? '' : indent;
  const name = wrap(label === '' ? section : label, panel.labels - inset.length).map((text) => inset + text);
  return [...name.slice(0, -1), lineOf(name[name.length - 1]!, texts, panel)];
}

function lineOf(label: string, texts: readonly string[], { chosen, widths, labels }: Panel): string {
  const cells = texts.map((text, index) => padStart(text, gap + widths[chosen[index]!]!));
  return (padEnd(label, labels) + cells.join('')).trimEnd();
}

/** Wrapped headings as rows of text, all standing on the last row. */
function standing(wrapped: readonly (readonly string[])[]): string[][] {
  const height = Math.max(...wrapped.map((lines) => lines.length));
  return Array.from({ length: height }, (_, row) => wrapped.map((lines) => lines[row - height + lines.length] ?? ''));
}
