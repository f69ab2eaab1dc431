/** What a reader has moved, in words. Pure. */
import type { Dial } from '../../sim/scenario/dial.ts';
import type { EditedCase } from '../../sim/scenario/edited.ts';

interface CaseDials {
  readonly name: string;
  readonly dials: readonly Dial[];
}

/** `Bond albedo 0.3 → 0.5 in all cases; Mixed layer depth 60 m → 10 m in “ocean”.`; null where nothing is moved. */
export function movesText(cases: readonly EditedCase[], known: readonly CaseDials[]): string | null {
  const own = cases.filter(({ name, from }) => name === from);
  const moves = new Map<string, string[]>();
  for (const { name, edits } of own) {
    for (const edit of edits) {
      const move = moveText(name, edit, known);
      moves.set(move, [...(moves.get(move) ?? []), name]);
    }
  }
  const kept = cases.filter(({ name, from }) => name !== from);
  const parts = [
    ...[...moves].map(([move, names]) => `${move}${whose(names, own.length)}`),
    ...kept.map(({ name, from }) => `“${name}” is kept from “${from}”`),
  ];
  return parts.length === 0 ? null : `${parts.join('; ')}.`;
}

/** A name for a case that is kept: what was moved in it. */
export function nameFor(from: string, edits: EditedCase['edits'], known: readonly CaseDials[]): string {
  const changes = edits.map(({ key, text }) => `${lowered(dialOf(from, key, known)?.label ?? key)} ${text}`);
  return `${from}, ${changes.join(', ')}`;
}

function moveText(name: string, { key, text }: EditedCase['edits'][number], known: readonly CaseDials[]): string {
  const dial = dialOf(name, key, known);
  return `${dial?.label ?? key} ${dial?.text ?? ''} → ${text}`;
}

function whose(names: readonly string[], all: number): string {
  if (all === 1) return '';
  return names.length === all ? ' in all cases' : ` in ${names.map((name) => `“${name}”`).join(', ')}`;
}

function dialOf(name: string, key: string, known: readonly CaseDials[]): Dial | undefined {
  return known.find((one) => one.name === name)?.dials.find((dial) => dial.key === key);
}

function lowered(label: string): string {
  return /^[A-Z][a-z]/.test(label) && !label.startsWith('Bond') ? `${label[0]!.toLowerCase()}${label.slice(1)}` : label;
}
