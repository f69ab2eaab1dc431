/** The findings of a spread as a table: mean, median and intervals of each, case by case. Pure. */
import type { SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import type { Cell } from './cells.ts';
import { percent } from './number.ts';
import {
  chiefFindings,
  type FindingInCase,
  findingSections,
  type SharedFinding,
  sharedFindings,
} from './spreadFindings.ts';
import { findingWording } from './spreadNumber.ts';

export const findingColumns = ['Mean', 'Median', '68 %', '95 %'] as const;

export interface FindingGroup {
  readonly name: string;
  readonly label: string;
  readonly rows: readonly { readonly caseIndex: number; readonly caseName: string; readonly cells: readonly Cell[] }[];
}

export interface FindingTables {
  readonly chief: readonly FindingGroup[];
  readonly sections: readonly { readonly title: string; readonly groups: readonly FindingGroup[] }[];
}

export function findingTables(report: SpreadReport): FindingTables {
  const all = sharedFindings(report.cases);
  const group = (shared: SharedFinding): FindingGroup => groupOf(shared, report);
  return {
    chief: chiefFindings(all).map(group),
    sections: findingSections(all).map(({ title, findings }) => ({ title, groups: findings.map(group) })),
  };
}

function groupOf({ name, label, inCases }: SharedFinding, report: SpreadReport): FindingGroup {
  const rows = inCases.map((one) => ({
    caseIndex: one.caseIndex,
    caseName: one.oneCase.name,
    cells: cellsOf(one, report),
  }));
  return { name, label, rows };
}

function cellsOf({ finding }: FindingInCase, { cases }: SpreadReport): Cell[] {
  const { summary, atCentre, missingBecause } = finding;
  const words = findingWording(finding, cases);
  const centre = atCentre === null ? 'none at centre' : `centre ${words.text(atCentre)}`;
  const share =
    summary.defined < 1
      ? {
          detail: `exists in ${percent(summary.defined)} of the draws${missingBecause === null ? '' : `; one lacks it because ${missingBecause}`}`,
        }
      : {};
  if (summary.mean === null || summary.percentiles === null) {
    if (summary.defined === 0) {
      const why = missingBecause ?? summary.reason ?? 'not defined';
      return [{ text: '—', reason: why }, { text: '—', detail: centre }, { text: '—' }, { text: '—' }];
    }
    const reason = summary.reason ?? 'not defined';
    return [{ text: '—', reason, ...share }, { text: '—', detail: centre }, { text: '—' }, { text: '—' }];
  }
  const levels = summary.percentiles;
  return [
    { text: words.text(summary.mean), ...share },
    { text: words.text(levels['50']), detail: centre },
    { text: words.interval(levels['16'], levels['84']) },
    { text: words.interval(levels['2.5'], levels['97.5']) },
  ];
}
