import type { ContourData, HeatmapData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import { insolationGroups, insolationMap } from '../../../viewer/figures/insolationMap.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { type ZonalCase, zonalRun } from '../zonalFixture.ts';

const wide = { theme: lightTheme, narrow: false, view: null };
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');
const groupsOf = (cases?: readonly ZonalCase[]) => insolationGroups(columnsOf(zonalRun(cases ? { cases } : {})));

describe('insolation by latitude and season', () => {
  test('states and cases with the same insolation share a figure', () => {
    const names = groupsOf().map((group) => group.map(({ caseName, stateName }) => [caseName, stateName]));
    expect(names).toEqual([
      [
        ['tilted sea', 'warm state'],
        ['tilted sea', 'cold state'],
      ],
      [['upright sea', null]],
    ]);
    const figures = groupsOf().map((_, shown) => insolationMap(groupsOf(), shown, wide));
    expect(figures.map(({ title }) => title)).toEqual([
      'Insolation by latitude and season: tilted sea',
      'Insolation by latitude and season: upright sea',
    ]);
    const [one, other] = figures.map(({ data }) => data[0] as Partial<HeatmapData>);
    expect([one!.zmin, one!.zmax]).toEqual([0, other!.zmax]);
  });

  test('where all share it the title needs no names', () => {
    const figure = insolationMap(groupsOf([{ name: 'a', coldState: true }]), 0, wide);
    expect(figure.title).toBe('Insolation by latitude and season');
    expect(figure.textAlternative).not.toContain('a:');
  });

  test('lines at round values, labelled', () => {
    const { data, caption } = insolationMap(groupsOf([{ name: 'a' }]), 0, wide);
    const levels = data
      .filter(({ type }) => type === 'contour')
      .map((trace) => (trace as Partial<ContourData>).contours!.start!);
    const step = Number(/a line every (\d+)/.exec(caption)![1]);
    expect(levels.length).toBeGreaterThanOrEqual(4);
    expect(levels.length).toBeLessThanOrEqual(7);
    expect(levels.every((level) => Number.isInteger(level / step))).toBe(true);
  });

  test('says where and when the most arrives, and whether there is polar night', () => {
    // Periapsis at Ls 250°, 35° tilt: the brightest is the southern polar summer.
    const figure = insolationMap(groupsOf([{ name: 'a' }]), 0, wide);
    expect(plain(figure.textAlternative)).toMatch(
      /^The most arrives at 75\.2° S, \d\.\d d (after|before) periapsis \(Ls 2[56]\d°\): \d+\.\d W m⁻²\. Some latitudes are dark/,
    );
    expect(figure.caption).toContain('polar night');
  });

  test('an insolation that the inputs hold all year is not called a day’s mean', () => {
    const run = zonalRun({ cases: [{ name: 'a' }] });
    const [only] = run.cases;
    const { dataset } = only!.states[0]!;
    const field = dataset.variables.bandInsolation!;
    const held = { ...field, data: field.data.map((_, at) => 300 + (at % 30)) };
    const states = [{ ...only!.states[0]!, dataset: { variables: { ...dataset.variables, bandInsolation: held } } }];
    const columns = columnsOf({ ...run, cases: [{ ...only!, states }] });
    const figure = insolationMap(insolationGroups(columns), 0, wide);
    expect(plain(figure.textAlternative)).toBe(
      'The most arrives at 75.2° N, all year: 329.0 W m⁻². No latitude is ever dark for a whole day.',
    );
    expect(figure.caption).toContain('the same all year');
    expect(figure.caption).not.toContain('polar night');
  });
});
