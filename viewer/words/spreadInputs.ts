/** The uncertain inputs as they were drawn. Pure. */
import type { SpreadInput, SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { largestCut } from '../../sim/studies/spread/spreadWarnings.ts';
import type { Cell } from './cells.ts';
import { nbsp, percent, unitText } from './number.ts';
import { inputWording } from './spreadNumber.ts';

export interface DrawnRow {
  readonly key: string;
  readonly label: string;
  /** In which all its numbers are; empty for a pure number. */
  readonly symbol: string;
  /** Cases that draw it so; null where all do. */
  readonly caseNames: readonly string[] | null;
  readonly cells: readonly Cell[];
}

export interface IdleRow {
  readonly key: string;
  readonly label: string;
  readonly reason: string;
}

export function drawnColumns({ sampling }: SpreadReport): string[] {
  const source = sampling === 'posterior' ? 'From' : 'As written';
  return [source, 'Centre', 'Median drawn', 'Cut away'];
}

/** Each input once for all cases that draw it alike. */
export function drawnRows({ cases }: SpreadReport): DrawnRow[] {
  const alike = new Map<string, { readonly input: SpreadInput; readonly names: string[] }>();
  for (const { name, inputs } of cases) {
    for (const input of inputs) {
      const id = JSON.stringify([input.key, input.text, input.column, input.summary.percentiles]);
      const known = alike.get(id);
      if (known) known.names.push(name);
      else alike.set(id, { input, names: [name] });
    }
  }
  return [...alike.values()].map(({ input, names }) => ({
    key: input.key,
    label: input.label,
    symbol: unitText(input.unit),
    caseNames: names.length === cases.length ? null : names,
    cells: cellsOf(input),
  }));
}

function cellsOf(input: SpreadInput): Cell[] {
  const { text, column, centre, summary, truncatedShare } = input;
  const words = inputWording(input);
  const levels = summary.percentiles;
  const none: Cell = { text: '—', reason: summary.reason ?? 'no draw' };
  return [
    { text: column === null ? text : `column “${column}”` },
    { text: words.number(centre) },
    levels === null
      ? none
      : { text: words.number(levels['50']), detail: `68${nbsp}%: ${words.interval(levels['16'], levels['84'])}` },
    cutCell(truncatedShare),
  ];
}

function cutCell(share: number): Cell {
  if (share === 0) return { text: 'nothing' };
  return share > largestCut ? { text: percent(share), reason: `more than 5${nbsp}%` } : { text: percent(share) };
}

/** Each once; with the cases that it concerns where not all. */
export function idleRows({ cases }: SpreadReport): IdleRow[] {
  const all = cases.flatMap(({ idle }) => idle);
  const ids = all.map((one) => JSON.stringify([one.key, one.reason]));
  return all.filter((one, at) => ids.indexOf(JSON.stringify([one.key, one.reason])) === at);
}
