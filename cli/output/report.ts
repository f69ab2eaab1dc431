/** `report.html`: the page that the build made, with this run's results in its one data block. */
import { readFileSync } from 'node:fs';
import { toPortable } from '../../sim/dataset/portable.ts';
import { SimError } from '../../sim/error.ts';
import type { RunResult } from '../../sim/run.ts';

const dataBlock = '<script type="application/json" id="perilag-data"></script>';
const blockEnd = '</script>';

/** The page of a run in pieces, ready to write. Errors: SimError when the template is missing or is not a report. */
export function reportPieces(result: RunResult, template: string): readonly (string | Uint8Array)[] {
  return pagePieces({ result }, template);
}

/** The page with anything in its data block. */
export function pagePieces(data: object, template: string): readonly (string | Uint8Array)[] {
  const page = readTemplate(template);
  const at = page.indexOf(dataBlock);
  if (at < 0 || page.indexOf(dataBlock, at + 1) >= 0) {
    throw new SimError(template, 'the report page has no single place for data', 'Run `npm run build`');
  }
  const cut = at + dataBlock.length - blockEnd.length;
  return [page.subarray(0, cut), embeddedJson(data), page.subarray(cut)];
}

/** JSON that cannot end the script block it stands in. */
export function embeddedJson(value: unknown): string {
  return JSON.stringify(toPortable(value, 'report')).replaceAll('<', '\\u003c');
}

function readTemplate(path: string): Buffer {
  try {
    return readFileSync(path);
  } catch (error) {
    throw new SimError(path, 'the report page is not built', 'Run `npm run build`', error);
  }
}
