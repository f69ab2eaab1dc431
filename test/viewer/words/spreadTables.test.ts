import { describe, expect, test } from 'vitest';
import { findingSections, sharedFindings } from '../../../viewer/words/spreadFindings.ts';
import { drawnRows, idleRows } from '../../../viewer/words/spreadInputs.ts';
import { spreadCautions, spreadSteps } from '../../../viewer/words/spreadMethod.ts';
import { findingTables } from '../../../viewer/words/spreadTable.ts';
import { spreadCase, spreadOf, withFinding } from '../spreadFixture.ts';

const plain = (text: string): string => text.replaceAll('\u00a0', ' ');
const sea = spreadCase();
const rock = spreadCase({ name: 'bare rock', heatCapacity: [4e5, 4e6] });

describe('the table of findings', () => {
  test('the chief ones first, every case under each; all findings once in their sections', () => {
    const { chief, sections } = findingTables(spreadOf([sea, rock]));
    expect(chief[0]!.name).toBe('temperatureMax');
    expect(chief[0]!.rows.map(({ caseName }) => caseName)).toEqual(['shallow sea', 'bare rock']);
    const all = sections.flatMap(({ groups }) => groups.map(({ name }) => name));
    expect(all.toSorted()).toEqual(sea.findings.map(({ name }) => name).toSorted());
    expect(sections.map(({ title }) => title)).toEqual([
      'Temperature',
      'When',
      'Response',
      'Windows',
      'Steady values and the textbook',
      'Orbit',
    ]);
  });

  test('the numbers are those of the report, in the unit of the trade', () => {
    const changed = withFinding(sea, 'lagOfMax', {
      atCentre: 86_400,
      summary: {
        mean: 2 * 86_400,
        percentiles: { '2.5': 43_200, '16': 86_400, '50': 129_600, '84': 172_800, '97.5': 259_200 },
        defined: 0.8,
      },
    });
    const [row] = findingTables(spreadOf([changed])).chief.find(({ name }) => name === 'lagOfMax')!.rows;
    expect(row!.cells.map(({ text }) => plain(text))).toEqual(['2.00 d', '1.50 d', '1.00 to 2.00 d', '0.50 to 3.00 d']);
    expect(row!.cells.map(({ detail }) => detail && plain(detail))).toEqual([
      'exists in 80.0 % of the draws',
      'centre 1.00 d',
      undefined,
      undefined,
    ]);
  });

  test('why a draw lacks it stands beside the share that has it; where none has it, alone', () => {
    const { summary } = sea.findings.find(({ name }) => name === 'damping')!;
    const cell = (changes: Parameters<typeof withFinding>[2]) => {
      const told = withFinding(sea, 'damping', { missingBecause: 'the store forgets', ...changes });
      return findingTables(spreadOf([told])).chief.find(({ name }) => name === 'damping')!.rows[0]!.cells[0]!;
    };
    expect(plain(cell({ summary: { ...summary, defined: 0.844 } }).detail!)).toBe(
      'exists in 84.4 % of the draws; one lacks it because the store forgets',
    );
    const none = { mean: null, percentiles: null, defined: 0, reason: 'no draw has a value' };
    expect(cell({ summary: none })).toEqual({ text: '—', reason: 'the store forgets' });
  });

  test('a finding without a number says why', () => {
    const none = withFinding(sea, 'damping', {
      atCentre: null,
      summary: { mean: null, percentiles: null, defined: 0, reason: 'the orbit is a circle' },
    });
    const [row] = findingTables(spreadOf([none])).chief.find(({ name }) => name === 'damping')!.rows;
    expect(row!.cells[0]).toMatchObject({ text: '—', reason: 'the orbit is a circle' });
    expect(row!.cells[1]!.detail).toBe('none at centre');
  });

  test('a finding of one case only is kept, and an unknown one finds a place', () => {
    const odd = {
      ...rock,
      findings: [...rock.findings, { ...rock.findings[0]!, name: 'novelty', label: 'A novelty' }],
    };
    const sections = findingSections(sharedFindings([sea, odd]));
    expect(sections.at(-1)).toMatchObject({ title: 'Others' });
    expect(sections.at(-1)!.findings[0]!.inCases.map(({ caseIndex }) => caseIndex)).toEqual([1]);
  });
});

describe('inputs as drawn', () => {
  test('what cases share stands once; what they draw each their own way, with their names', () => {
    const rows = drawnRows(spreadOf([sea, rock]));
    expect(rows.map(({ key, caseNames }) => [key, caseNames])).toEqual([
      ['planet.bondAlbedo', null],
      ['orbit.eccentricity', null],
      ['star.luminosity', null],
      ['planet.heatStore.heatCapacity', ['shallow sea']],
      ['planet.heatStore.heatCapacity', ['bare rock']],
    ]);
    expect(plain(rows[2]!.cells.map(({ text }) => text).join(' | '))).toBe(
      '0.52 ± 0.02 Lsun | 0.520 | 0.520 | nothing',
    );
    expect(rows[2]!.symbol).toBe('Lsun');
  });

  test('more than 5 % cut away is marked; less is told only', () => {
    const cut = (share: number) =>
      spreadOf([{ ...sea, inputs: [{ ...sea.inputs[0]!, truncatedShare: share }, ...sea.inputs.slice(1)] }]);
    expect(drawnRows(cut(0.072))[0]!.cells.at(-1)).toMatchObject({ text: '7.2\u00a0%', reason: 'more than 5\u00a0%' });
    expect(drawnRows(cut(0.04))[0]!.cells.at(-1)).toEqual({ text: '4.0\u00a0%' });
  });

  test('a posterior names its columns; what is idle stands once', () => {
    const one = spreadCase({ sampling: 'posterior' });
    const idle = { key: 'star.age', label: 'Age', reason: 'this model does not use it' };
    const report = spreadOf(
      [
        { ...one, idle: [idle] },
        { ...one, name: 'other', idle: [idle] },
      ],
      { sampling: 'posterior' },
    );
    expect(drawnRows(report)[0]!.cells[0]!.text).toBe('column “bondAlbedo”');
    expect(idleRows(report)).toEqual([idle]);
  });
});

describe('how it was computed', () => {
  const words = (report: Parameters<typeof spreadSteps>[0]): string =>
    spreadSteps(report)
      .map((step) => `${step.words} ${step.source ?? ''}`)
      .join('\n');

  test('Sobol’ points: their table, indices, and intervals rather too wide', () => {
    const text = words(spreadOf([sea]));
    for (const part of [
      'Joe & Kuo (2008)',
      'Matoušek (1998)',
      'Saltelli et al. (2010)',
      'Jansen (1999)',
      'Mardia & Jupp',
    ])
      expect(text).toContain(part);
    expect(text).toContain('rather too wide than too narrow');
    expect(text).not.toContain('Dette');
  });

  test('how groups are told, where there are any', () => {
    const groups = [
      { share: 0.2, from: 200, to: 220 },
      { share: 0.8, from: 270, to: 300 },
    ] as const;
    const words = (report: ReturnType<typeof spreadOf>) =>
      spreadSteps(report)
        .map((step) => step.words)
        .join(' ');
    expect(words(spreadOf([withFinding(sea, 'temperatureMean', { groups })]))).toContain('fall into two groups where');
    expect(words(spreadOf([sea]))).not.toContain('two groups');
  });

  test('a posterior: ranks and no indices; random draws: their generator and no word of Sobol’ points', () => {
    const posterior = words(spreadOf([spreadCase({ sampling: 'posterior' })], { sampling: 'posterior', indexRows: 0 }));
    expect(posterior).toContain('Dette, Siburg & Stoimenov');
    expect(posterior).not.toContain('Saltelli');
    const random = words(spreadOf([sea], { sampling: 'random' }));
    expect(random).toContain('Philox');
    expect(random).not.toContain('rather too wide');
  });

  test('bands from the first draws say so', () => {
    expect(words(spreadOf([sea], { draws: 100_000 }))).toContain('from the first 512 draws');
    expect(words(spreadOf([sea]))).toContain('from all 512 draws');
  });

  test('the cautions: stated spreads only, no basis for safety, times from the observatory', () => {
    const text = spreadCautions(spreadOf([sea])).join('\n');
    expect(text).toMatch(/stated spreads only/);
    expect(text).toMatch(/no basis for qualifying hardware or for anyone’s safety/);
    expect(text).toMatch(/observatory’s own tools/);
  });
});
