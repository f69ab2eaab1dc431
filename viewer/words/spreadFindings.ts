/** Which findings come first, and under which heads all of them stand. Pure. */
import type { SpreadCase, SpreadFinding } from '../../sim/studies/spread/spreadReport.ts';
import { findingOf } from './spreadNumber.ts';

/** One finding in the cases that have it. */
export interface SharedFinding {
  readonly name: string;
  readonly label: string;
  readonly unit: string;
  readonly inCases: readonly FindingInCase[];
}

export interface FindingInCase {
  readonly oneCase: SpreadCase;
  readonly caseIndex: number;
  readonly finding: SpreadFinding;
}

export interface FindingSection {
  readonly title: string;
  readonly findings: readonly SharedFinding[];
}

/** In the order of the report of a run. */
const sections: readonly (readonly [string, RegExp])[] = [
  ['Windows', /\./],
  ['Temperature', /^(temperature|emissionTemperature|hottestTemperature|coldestTemperature|contrast|seasonalRange)/],
  ['When', /^(timeOf|lagOf|hottestTime|coldestTime)/],
  ['Response', /^(damping|radiativeTimeConstant|stabilityMargin|fastest)/],
  ['Latitudes and ice', /Latitude|[iI]ce|^climates$/],
  ['Steady values and the textbook', /^(steady|equilibrium|circular|fluxMean)/],
  ['Orbit', /^(period|orbitMean)/],
];
const order = [
  'Temperature',
  'When',
  'Response',
  'Latitudes and ice',
  'Windows',
  'Steady values and the textbook',
  'Orbit',
  'Others',
];

const chief: readonly RegExp[] = [
  /^temperatureMax$/,
  /^temperatureMean$/,
  /^temperatureMin$/,
  /^hottestTemperature$/,
  /^coldestTemperature$/,
  /^timeOfMax$/,
  /^lagOfMax$/,
  /^damping$/,
  /^(fractionInWindow|habitableFraction)\./,
  /^equilibriumTemperature$/,
];

/** Each finding once, in the order in which it first appears. */
export function sharedFindings(cases: readonly SpreadCase[]): SharedFinding[] {
  const names = [...new Set(cases.flatMap(({ findings }) => findings.map(({ name }) => name)))];
  return names.map((name) => sharedFinding(cases, name));
}

function sharedFinding(cases: readonly SpreadCase[], name: string): SharedFinding {
  const inCases = cases.flatMap((oneCase, caseIndex) => {
    const finding = findingOf(oneCase, name);
    return finding === undefined ? [] : [{ oneCase, caseIndex, finding }];
  });
  const { label, unit } = inCases[0]!.finding;
  return { name, label, unit, inCases };
}

/** The numbers that people quote, in the order in which they ask for them; all where none of them is known. */
export function chiefFindings(all: readonly SharedFinding[]): SharedFinding[] {
  const found = chief.flatMap((pattern) => all.filter(({ name }) => pattern.test(name)));
  return found.length > 0 ? found : [...all];
}

export function findingSections(all: readonly SharedFinding[]): FindingSection[] {
  return order
    .map((title) => ({ title, findings: all.filter(({ name }) => sectionOf(name) === title) }))
    .filter(({ findings }) => findings.length > 0);
}

function sectionOf(name: string): string {
  return sections.find(([, pattern]) => pattern.test(name))?.[0] ?? 'Others';
}
