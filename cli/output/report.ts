/** `report.html`: the page that the build made, with this run's results in its one data block. */
import { readFileSync } from 'node:fs';
import { pageStride } from '../../sim/dataset/forPage.ts';
import { toPortable } from '../../sim/dataset/portable.ts';
import { SimError } from '../../sim/error.ts';
import { caseForPage } from '../../sim/live/caseForPage.ts';
import type { RunResult } from '../../sim/run.ts';
import { toPortableTree } from '../../sim/scenario/portableTree.ts';
import type { Branch } from '../../sim/scenario/tree.ts';

const dataBlock = '<script type="application/json" id="perilag-data"></script>';
const blockEnd = '</script>';

/** What the page of a run carries: the numbers, and the scenario whose numbers its reader may move. */
interface Reported {
  readonly result: RunResult;
  /** Null for a page that only shows. */
  readonly tree: Branch | null;
}

/** The page of a run in pieces, ready to write. Errors: SimError when the template is missing or is not a report. */
export function reportPieces({ result, tree }: Reported, template: string): readonly (string | Uint8Array)[] {
  return pagePieces({ result: thinned(result), tree: tree === null ? null : toPortableTree(tree) }, template);
}

/** The result with fields of fewer rows, and a note that says so. */
function thinned(result: RunResult): RunResult {
  const datasets = result.cases.flatMap(({ states }) => states.map(({ dataset }) => dataset));
  const longest = Math.max(...datasets.map(pageStride));
  if (longest === 1) return result;
  return {
    ...result,
    cases: result.cases.map(caseForPage),
    notes: [
      ...result.notes,
      `The figures of this page are drawn from one row of the year in ${longest}, or more; the tables are of the whole, and fields.nc and series.csv hold every row.`,
    ],
  };
}

/** The page with anything in its data block. */
export function pagePieces(data: object, template: string): readonly (string | Uint8Array)[] {
  const page = readTemplate(template);
  const at = page.indexOf(dataBlock);
  if (at < 0) throw new SimError(template, 'the report page has no place for data', 'Run `npm run build`');
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
