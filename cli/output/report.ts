/** `report.html`: the page that the build made, with this run's results in its one data block. */
import { readFileSync } from 'node:fs';
import { toPortable } from '../../sim/dataset/portable.ts';
import { everyRow, rowStride } from '../../sim/dataset/thin.ts';
import { SimError } from '../../sim/error.ts';
import type { RunResult } from '../../sim/run.ts';

const dataBlock = '<script type="application/json" id="perilag-data"></script>';
const blockEnd = '</script>';

/** The page of a run in pieces, ready to write. Errors: SimError when the template is missing or is not a report. */
export function reportPieces(result: RunResult, template: string): readonly (string | Uint8Array)[] {
  return pagePieces({ result: forPage(result) }, template);
}

/** Numbers of a field in a page, which goes by mail: some 200 by 90, more than a screen shows. */
const largestField = 18_000;

/** The result with fields of fewer rows, and a note that says so. */
function forPage(result: RunResult): RunResult {
  const strides = result.cases.flatMap(({ states }) => states.map(({ dataset }) => rowStride(dataset, largestField)));
  const longest = Math.max(...strides);
  if (longest === 1) return result;
  return {
    ...result,
    cases: result.cases.map((one) => ({
      ...one,
      states: one.states.map((state) => {
        return { ...state, dataset: everyRow(state.dataset, rowStride(state.dataset, largestField)) };
      }),
    })),
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
