/** What a command says when all is written: where its report is, and what stands beside it. */
import { join } from 'node:path';
import type { Terminal } from './terminal.ts';
import { hanging } from './text.ts';

/** Lines for standard error. The path stays in one piece, to be copied; `beside` are names in the same folder. */
export function writtenText(folder: string, beside: readonly string[], terminal: Terminal): string {
  const files = hanging('files   ', `${beside.join(', ')} beside it`, terminal.width);
  return `report  ${terminal.say(join(folder, 'report.html'))}\n${files.join('\n')}\n`;
}
