/** What `spread` shows of each case: the chief findings with their intervals, what matters most, what was not drawn. */
import { formatNumber, inUnit } from '../../sim/quantity/index.ts';
import { percentileLevels } from '../../sim/studies/spread/percentiles.ts';
import { percentWords } from '../../sim/studies/spread/percentWords.ts';
import type { SpreadCase, SpreadFinding, SpreadReport } from '../../sim/studies/spread/spreadReport.ts';
import { panels } from './grid.ts';
import type { Terminal } from './terminal.ts';
import { hanging, wrap } from './text.ts';

interface Chief {
  readonly name: string;
  readonly section: string;
  readonly label: string;
}

/** Shown where a case has them, in sections; the files have all. */
const chief: readonly Chief[] = [
  { name: 'temperatureMax', section: 'temperature, K', label: 'maximum' },
  { name: 'temperatureMean', section: 'temperature, K', label: 'mean' },
  { name: 'temperatureMin', section: 'temperature, K', label: 'minimum' },
  { name: 'hottestTemperature', section: 'temperature, K', label: 'hottest anywhere' },
  { name: 'coldestTemperature', section: 'temperature, K', label: 'coldest anywhere' },
  { name: 'equilibriumTemperature', section: 'temperature, K', label: 'textbook equilibrium' },
  { name: 'timeOfMax', section: 'maximum comes, d', label: 'after periapsis' },
  { name: 'lagOfMax', section: 'maximum comes, d', label: 'after the steady maximum' },
  { name: 'damping', section: 'damping', label: '' },
  { name: 'iceFractionMean', section: 'ice, share of area', label: '' },
  { name: 'orbitMeanInstellation', section: 'mean instellation, W/m2', label: '' },
  { name: 'period', section: 'period, d', label: '' },
];
const windowSections: Readonly<Record<string, string>> = {
  fractionInWindow: 'share of time in',
  habitableFraction: 'share of area and time in',
};
const mostImportant = 3;

/** Lines that fit the terminal, from 40 columns up. */
export function spreadLines(report: SpreadReport, terminal: Terminal): string[] {
  const title = wrap(terminal.say(report.scenario.title ?? report.scenario.file), terminal.width);
  const head = `${report.draws} draws (${samplingWords[report.sampling]}), seed ${report.seed}`;
  return [
    ...title.map((line) => terminal.paint('bold', line)),
    ...wrap(terminal.say(head), terminal.width).map((line) => terminal.paint('dim', line)),
    ...report.cases.flatMap((one) => ['', ...caseLines(one, report.draws, terminal)]),
  ];
}

const samplingWords = { sobol: "scrambled Sobol' points", random: 'pseudo-random', posterior: 'posterior samples' };

function caseLines(one: SpreadCase, draws: number, terminal: Terminal): string[] {
  const rows = rowsOf(one);
  const grid = {
    headings: ['2.5 %', '16 %', 'median', '84 %', '97.5 %', 'centre'].map((text) => terminal.say(text)),
    rows: rows.map(({ section, label }) => ({
      section: terminal.say(section),
      label: terminal.say(label),
      alone: terminal.say(label === '' ? section : `${section}: ${label}`),
    })),
    cells: rows.map(({ finding }) => cellsOf(finding)),
  };
  const findings = rows.map(({ finding }) => finding);
  const name = wrap(terminal.say(`${one.name} (${one.model})`), terminal.width);
  return [
    ...name.map((line) => terminal.paint('bold', line)),
    ...panels(grid, terminal).flatMap((panel, index) => (index === 0 ? panel : ['', ...panel])),
    ...undefinedLines(findings, (draws - one.failed) / draws, terminal),
    ...importanceLines(one, terminal),
    ...one.idle.flatMap(({ key, reason }) => hanging('not drawn ', terminal.say(`${key}: ${reason}`), terminal.width)),
    ...one.warnings.flatMap((text) => hanging('warning   ', terminal.say(text), terminal.width)),
    ...one.notes.flatMap((text) => hanging('note      ', terminal.say(text), terminal.width)),
  ];
}

function rowsOf({ findings }: SpreadCase): { section: string; label: string; finding: SpreadFinding }[] {
  const named = chief.flatMap(({ name, section, label }) => {
    const finding = findings.find((one) => one.name === name);
    return finding ? [{ section, label, finding }] : [];
  });
  const windows = findings.flatMap((finding) => {
    const [, kind, name] = /^(fractionInWindow|habitableFraction)\.(.*)$/s.exec(finding.name) ?? [];
    return kind === undefined ? [] : [{ section: windowSections[kind]!, label: name!, finding }];
  });
  return [...named, ...windows];
}

function cellsOf(finding: SpreadFinding): string[] {
  const { percentiles } = finding.summary;
  const numbers =
    percentiles === null ? [null, null, null, null, null] : percentileLevels.map((level) => percentiles[level]);
  return [...numbers, finding.atCentre].map((value) => {
    if (value === null) return '—';
    return formatNumber(finding.unit === 's' ? inUnit(value, 'd') : value, 4);
  });
}

/** Findings that some of the sound draws lack; draws that failed are told once, at the end. */
function undefinedLines(findings: readonly SpreadFinding[], sound: number, terminal: Terminal): string[] {
  return findings.flatMap(({ label, summary, missingBecause }) => {
    const because = missingBecause === null ? '' : `; one lacks it because ${missingBecause}`;
    if (summary.reason !== undefined) {
      const why = summary.defined === 0 && missingBecause !== null ? `none: ${missingBecause}` : summary.reason;
      return hanging('          ', terminal.say(`${label}: ${why}`), terminal.width);
    }
    if (summary.defined >= sound) return [];
    const text = `${label}: defined in ${percentWords(summary.defined)} of the draws${because}`;
    return hanging('          ', terminal.say(text), terminal.width);
  });
}

function importanceLines(one: SpreadCase, terminal: Terminal): string[] {
  return ['temperatureMean', 'temperatureMax', 'lagOfMax'].flatMap((name) => {
    const finding = one.findings.find((candidate) => candidate.name === name);
    if (!finding) return [];
    const { total, ranks } = finding.importance;
    const parts = one.inputs.flatMap(({ key }, i) => {
      const size = total?.[i]?.value ?? ranks?.[i]?.value ?? null;
      return size === null ? [] : [{ size, text: `${key} ${share(size)}` }];
    });
    if (parts.length === 0) return [];
    const chosen = parts.toSorted((a, b) => b.size - a.size).slice(0, mostImportant);
    const head = total === null ? 'goes along with' : 'total index';
    return hanging(
      'matters   ',
      terminal.say(`${finding.label}, ${head}: ${chosen.map(({ text }) => text).join(', ')}`),
      terminal.width,
    );
  });
}

/** An estimate of nothing may come out below it. */
function share(value: number): string {
  return Math.max(0, value).toFixed(2);
}
