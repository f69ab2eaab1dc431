import type { ScatterData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import type { FigureStyle } from '../../../viewer/figures/figure.ts';
import { importanceBars, mostInputs } from '../../../viewer/figures/importanceBars.ts';
import { panelGrid } from '../../../viewer/figures/panels.ts';
import { bandGroups, spreadBands } from '../../../viewer/figures/spreadBands.ts';
import { spreadHistogram } from '../../../viewer/figures/spreadHistogram.ts';
import { mostPoints, spreadScatter } from '../../../viewer/figures/spreadScatter.ts';
import { darkTheme, lightTheme } from '../../../viewer/figures/theme.ts';
import { sharedFindings } from '../../../viewer/words/spreadFindings.ts';
import { daysPerPeriod, spreadCase, spreadOf, turnedTo, withFinding } from '../spreadFixture.ts';

const wide: FigureStyle = { theme: lightTheme, narrow: false, view: null };
const phone: FigureStyle = { theme: darkTheme, narrow: true, view: null };
const sea = spreadCase();
const rock = spreadCase({ name: 'bare rock', heatCapacity: [4e5, 4e6] });
const report = spreadOf([sea, rock]);
const shared = (name: string, of = report) => sharedFindings(of.cases).find((one) => one.name === name)!;
const plain = (text: string): string => text.replaceAll('\u00a0', ' ');

interface Drawn extends Partial<ScatterData> {
  readonly x: number[];
  readonly y: number[];
}
const traces = (figure: { readonly data: readonly unknown[] }): Drawn[] => figure.data as Drawn[];

function everyNumber(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  if (value === null || typeof value !== 'object') return [];
  return Object.values(value).flatMap(everyNumber);
}

describe('panelGrid', () => {
  test('panels do not overlap and lie within the figure, wide and narrow', () => {
    for (const style of [wide, phone]) {
      for (const count of [1, 2, 3, 4, 5, 7]) {
        const { panels, panelHeight, height } = panelGrid(count, 3, 200, style);
        for (const [at, one] of panels.entries()) {
          expect((one.yDomain[1] - one.yDomain[0]) * height).toBeCloseTo(panelHeight, 6);
          for (const domain of [one.xDomain, one.yDomain]) {
            expect(domain[0]).toBeGreaterThanOrEqual(0);
            expect(domain[1]).toBeLessThanOrEqual(1);
          }
          for (const other of panels.slice(at + 1)) {
            const apart = (a: readonly number[], b: readonly number[]) => a[1]! <= b[0]! || b[1]! <= a[0]!;
            expect(apart(one.xDomain, other.xDomain) || apart(one.yDomain, other.yDomain)).toBe(true);
          }
        }
      }
    }
  });
});

describe('spreadBands', () => {
  const [group] = bandGroups(report);

  test('nested bands around the median, a panel for each case, with the run at the centre', () => {
    const figure = spreadBands(group!, report, wide);
    expect(traces(figure)).toHaveLength(12);
    for (const first of [0, 6]) {
      const [p2, p97, p16, p84, centre, median] = traces(figure).slice(first, first + 6);
      for (const at of median!.x.keys()) {
        const inOrder = [p2, p16, median, p84, p97].map((trace) => trace!.y[at]!);
        expect(inOrder).toEqual(inOrder.toSorted((a, b) => a - b));
      }
      expect(p97!.fill).toBe('tonexty');
      expect(p84!.fill).toBe('tonexty');
      expect(centre!.line!.dash).toBe('dash');
    }
    expect(new Set(traces(figure).map(({ xaxis }) => xaxis))).toEqual(new Set(['x', 'x2']));
  });

  test('one orbit from a quarter before periapsis, every value where it was given', () => {
    const median = traces(spreadBands(group!, report, wide))[5]!;
    expect(median.x[0]).toBeLessThanOrEqual(-0.25);
    expect(median.x.at(-1)).toBeGreaterThanOrEqual(0.75);
    const { positions, levels } = sea.bands[0]!;
    for (const [at, x] of median.x.entries()) {
      const from = positions.findIndex((position) => Math.abs(position - (x - Math.floor(x + 1e-12))) < 1e-9);
      expect(median.y[at]).toBe(levels[2]![from]);
    }
  });

  test('positions that close the circle are not drawn twice', () => {
    const band = sea.bands[0]!;
    const closed = (values: Float64Array, end: number) => Float64Array.from([...values, end]);
    const one = {
      ...sea,
      bands: [
        {
          ...band,
          positions: closed(band.positions, 1),
          levels: band.levels.map((level) => closed(level, level[0]!)),
          atCentre: closed(band.atCentre, band.atCentre[0]!),
        },
      ],
    };
    const of = (oneCase: typeof sea) => {
      const alone = spreadOf([oneCase]);
      return traces(spreadBands(bandGroups(alone)[0]!, alone, wide))[5]!.x;
    };
    expect(of(one)).toEqual(of(sea));
  });

  test('by latitude: a figure of its own, on an axis of equal areas', () => {
    const zonal = spreadOf([spreadCase({ zonal: true })]);
    const groups = bandGroups(zonal);
    expect(groups.map(({ along }) => along)).toEqual(['orbit', 'latitude']);
    const figure = spreadBands(groups[1]!, zonal, wide);
    expect(figure.title).toBe('Annual mean temperature by latitude, with its spread');
    const { x } = traces(figure)[5]!;
    expect(x[1]! - x[0]!).toBeCloseTo(x.at(-1)! - x.at(-2)!, 9);
    expect(plain(figure.textAlternative)).toMatch(/^The median is highest at .* \(95 %: .*\); the 95 % band is widest/);
  });

  test('where the bands are from fewer draws than all, the caption says it', () => {
    expect(spreadBands(group!, report, wide).caption).toContain('From all 512 draws.');
    const more = { ...report, draws: 100_000 };
    expect(spreadBands(group!, more, wide).caption).toContain('From the first 512 draws.');
  });
});

describe('spreadHistogram', () => {
  test('shares of the draws, with the textbook’s value and the run’s', () => {
    const figure = spreadHistogram(shared('temperatureMax'), report, wide);
    for (const { y } of traces(figure)) expect(y.reduce((sum, share) => sum + share, 0)).toBeCloseTo(100, 9);
    const marks = figure.layout.shapes!.filter(({ name }) => !name!.startsWith('edge of'));
    expect(marks.map(({ name }) => name)).toEqual([
      'every input at its centre',
      'textbook',
      'every input at its centre',
      'textbook',
    ]);
    const textbook = sea.findings.find(({ name }) => name === 'equilibriumTemperature')!.atCentre;
    expect(marks[1]!.x0).toBe(textbook);
  });

  test('the textbook’s temperature stands beside temperatures only', () => {
    for (const name of ['damping', 'lagOfMax', 'equilibriumTemperature']) {
      const figure = spreadHistogram(shared(name), report, wide);
      expect(figure.caption).not.toContain('textbook');
      expect(figure.layout.shapes!.every((shape) => shape.name !== 'textbook')).toBe(true);
    }
  });

  test('a time is in days, and the centre in the turn in which the draws are counted', () => {
    const period = daysPerPeriod * 86_400;
    const base = sea.findings.find(({ name }) => name === 'timeOfMax')!;
    const early = withFinding(sea, 'timeOfMax', {
      atCentre: -86_400,
      histogram: { from: -3 * 86_400, to: 2 * 86_400, counts: [1, 4, 6, 3, 1], beyond: 1 },
    });
    const one = spreadOf([early]);
    const figure = spreadHistogram(shared('timeOfMax', one), one, wide);
    expect(traces(figure)[0]!.x).toEqual([-2.5, -1.5, -0.5, 0.5, 1.5]);
    expect(figure.layout.shapes![0]!.x0).toBeCloseTo(-1, 9);
    expect(turnedTo(period - 86_400, 0)).toBeCloseTo(-86_400, 3);
    expect(figure.caption).toMatch(/before periapsis.*beyond the bins/);
    expect(base.circular).toBe(true);
  });

  test('no histogram: a note in place of bars', () => {
    const none = spreadOf([
      withFinding(sea, 'damping', {
        histogram: null,
        summary: { mean: null, percentiles: null, defined: 0, reason: 'no draw has a value' },
      }),
    ]);
    const figure = spreadHistogram(shared('damping', none), none, wide);
    expect(figure.data).toEqual([]);
    expect(figure.layout.annotations![0]!.text).toMatch(/Fewer than two draws/);
    expect(figure.textAlternative).toBe('None; no draw has a value.');
  });
});

describe('importanceBars', () => {
  test('first order and total of every input, most important first, with their 95 % intervals', () => {
    const figure = importanceBars(shared('temperatureMax'), report, wide);
    const bars = figure.data as unknown as {
      x: number[];
      y: number[];
      error_x: { array: number[]; arrayminus: number[] };
    }[];
    expect(bars).toHaveLength(4);
    const [first, total] = bars;
    expect(total!.x).toEqual(total!.x.toSorted((a, b) => b - a));
    const { importance } = sea.findings.find(({ name }) => name === 'temperatureMax')!;
    const most = importance.total!.reduce(
      (best, one, at) => (one.value > importance.total![best]!.value ? at : best),
      0,
    );
    const { value, percentiles } = importance.first![most]!;
    expect(first!.x[0]).toBe(value);
    expect(first!.x[0]! + first!.error_x.array[0]!).toBeCloseTo(percentiles['97.5'], 12);
    expect(first!.x[0]! - first!.error_x.arrayminus[0]!).toBeCloseTo(percentiles['2.5'], 12);
    // Every bar has a place of its own, from the top down.
    const places = bars.flatMap(({ y }) => y);
    expect(new Set(places).size).toBe(places.length);
  });

  test('the albedo’s index of T_eq in closed form, from the fixture’s own distributions', () => {
    // T ∝ (1 − A)^¼ L^¼: to first order var ∝ (σ_A / 4(1 − A))² + (σ_L / 4L)²: 0.08/0.7 against 0.02/0.52 gives a share of 0.898;
    // the index of 256 rows has a 95 % interval of some ±0.15.
    const importance = sea.findings.find(({ name }) => name === 'equilibriumTemperature')!.importance;
    expect(Math.abs(importance.first![0]!.value - 0.898)).toBeLessThan(0.15);
  });

  test('ranks: one bar an input, beside the level of chance', () => {
    const posterior = spreadOf([spreadCase({ sampling: 'posterior' })], { sampling: 'posterior', indexRows: 0 });
    const figure = importanceBars(shared('temperatureMax', posterior), posterior, phone);
    expect(figure.data).toHaveLength(1);
    const { ranks } = posterior.cases[0]!.findings.find(({ name }) => name === 'temperatureMax')!.importance;
    expect(figure.layout.shapes!.map(({ x0 }) => x0)).toEqual(ranks!.map(() => ranks![0]!.chanceLevel));
    expect(figure.caption).toMatch(/goes along with another shares its value/);
  });

  test('ranks: no bar where nothing can be told, and the reason in words', () => {
    const base = spreadCase({ sampling: 'posterior' });
    const { importance } = base.findings.find(({ name }) => name === 'temperatureMax')!;
    const unknown = { value: null, chanceLevel: null, reason: 'the input is the same in every draw' } as const;
    const ranks = importance.ranks!.map((one, at) => (at === 0 ? unknown : one));
    const one = spreadOf([withFinding(base, 'temperatureMax', { importance: { ...importance, ranks } })], {
      sampling: 'posterior',
      indexRows: 0,
    });
    const figure = importanceBars(shared('temperatureMax', one), one, wide);
    expect(traces(figure)[0]!.x).toHaveLength(ranks.length - 1);
    expect(everyNumber(figure.layout).every(Number.isFinite)).toBe(true);
    expect(figure.textAlternative).toMatch(
      /Of the Bond albedo it cannot be told: the input is the same in every draw\./,
    );
  });

  test('where there are none, the reason stands in their place', () => {
    const none = spreadOf([
      withFinding(sea, 'temperatureMax', {
        importance: {
          first: null,
          total: null,
          ranks: null,
          leftOut: 0,
          reason: 'the finding is the same in every run',
        },
      }),
      rock,
    ]);
    const figure = importanceBars(shared('temperatureMax', none), none, wide);
    const texts = figure.layout.annotations!.map(({ text }) => text);
    expect(texts).toContain('<i>the finding is the same in every run</i>');
    expect(figure.data).toHaveLength(2);
  });

  test('what holds for every case is said once, and an empty figure has no axis', () => {
    const figure = importanceBars(shared('period'), report, wide);
    expect(figure.textAlternative).toBe(
      'In every case: What matters most to orbital period is not known: the finding is the same in every run.',
    );
    expect(figure.layout.xaxis!.visible).toBe(false);
  });

  test('of many inputs those that matter most are shown, and that is said', () => {
    const finding = sea.findings.find(({ name }) => name === 'temperatureMax')!;
    const times = (list: readonly unknown[]) => [...list, ...list, ...list];
    const many = {
      ...withFinding(sea, 'temperatureMax', {
        importance: {
          first: times(finding.importance.first!) as typeof finding.importance.first,
          total: times(finding.importance.total!) as typeof finding.importance.total,
          ranks: null,
          leftOut: 0,
        },
      }),
      inputs: times(sea.inputs) as typeof sea.inputs,
    };
    const figure = importanceBars(shared('temperatureMax', spreadOf([many])), spreadOf([many]), wide);
    expect(traces(figure)[0]!.x).toHaveLength(mostInputs);
    expect(figure.caption).toContain(`The ${mostInputs} that matter most are shown.`);
  });
});

describe('spreadScatter', () => {
  test('a point for each draw that has both, in the units shown, and the centre', () => {
    const figure = spreadScatter(shared('lagOfMax'), 'planet.bondAlbedo', report, wide);
    const column = sea.sample.findings[sea.findings.findIndex(({ name }) => name === 'lagOfMax')]!;
    const whole = column.flatMap((value) => (value === null ? [] : [value / 86_400]));
    expect(whole.length).toBeLessThan(column.length);
    expect(traces(figure)[0]!.y).toEqual(whole);
    expect(traces(figure)[1]!.x).toEqual([0.3]);
  });

  test('an input that spans decades stands on a logarithmic axis', () => {
    const axis = (key: string) => spreadScatter(shared('temperatureMax'), key, report, wide).layout.xaxis!.type;
    expect(axis('planet.heatStore.heatCapacity')).toBe('log');
    expect(axis('orbit.eccentricity')).toBe('linear');
  });

  test('what rises and what falls is said in words', () => {
    const text = plain(
      spreadScatter(shared('temperatureMax'), 'planet.heatStore.heatCapacity', report, wide).textAlternative,
    );
    expect(text).toMatch(
      /^shallow sea: maximum temperature falls closely with areal heat capacity \(rank correlation −0\.9/,
    );
    expect(text).toMatch(/in 256 draws/);
  });

  test('a case without the input has no panel', () => {
    const { inputs, sample } = rock;
    const less = { ...rock, inputs: inputs.slice(1), sample: { ...sample, inputs: sample.inputs.slice(1) } };
    const both = spreadOf([sea, less]);
    const panels = (key: string) => spreadScatter(shared('temperatureMax', both), key, both, wide).data.length / 2;
    expect(panels('planet.bondAlbedo')).toBe(1);
    expect(panels('orbit.eccentricity')).toBe(2);
    const alone = spreadScatter(shared('temperatureMax', both), 'planet.bondAlbedo', both, wide);
    expect(alone.layout.annotations!.map(({ text }) => text)).toEqual([expect.stringContaining('shallow sea')]);
  });

  test('more points than the page can bear are cut, and their number is said', () => {
    const longer = (list: readonly (number | null)[]) => Array.from({ length: 4000 }, (_, at) => list[at % 256]!);
    const long = {
      ...sea,
      sample: {
        inputs: sea.sample.inputs.map((column) => Float64Array.from(longer(Array.from(column)))),
        findings: sea.sample.findings.map(longer),
      },
    };
    const one = spreadOf([long]);
    const figure = spreadScatter(shared('temperatureMax', one), 'planet.bondAlbedo', one, wide);
    expect(traces(figure)[0]!.x).toHaveLength(mostPoints);
    expect(figure.caption).toContain(`the first ${mostPoints} that have the number`);
  });

  test('times on both sides of periapsis are one cloud', () => {
    const period = daysPerPeriod * 86_400;
    const at = sea.findings.findIndex(({ name }) => name === 'timeOfMax');
    const around = sea.sample.findings[at]!.map((_, row) => (row % 2 === 0 ? 86_400 : period - 86_400));
    const base = withFinding(sea, 'timeOfMax', { summary: { ...sea.findings[at]!.summary, mean: 0 }, atCentre: 0 });
    const both = {
      ...base,
      sample: { ...sea.sample, findings: sea.sample.findings.map((column, place) => (place === at ? around : column)) },
    };
    const one = spreadOf([both]);
    const { y } = traces(spreadScatter(shared('timeOfMax', one), 'planet.bondAlbedo', one, wide))[0]!;
    for (const [row, value] of y.entries()) expect(value).toBeCloseTo(row % 2 === 0 ? 1 : -1, 6);
  });
});

describe('every figure of a spread', () => {
  const nasty = '<img src=x onerror=alert(1)>\u202eevil</script>';
  const odd = spreadOf([
    {
      ...sea,
      name: nasty,
      inputs: sea.inputs.map((input) => ({ ...input, label: nasty })),
      findings: sea.findings.map((finding) => ({ ...finding, label: nasty })),
      bands: sea.bands.map((band) => ({ ...band, label: nasty })),
    },
    rock,
  ]);
  const figures = (of: typeof report, style: FigureStyle) => [
    ...bandGroups(of).map((group) => spreadBands(group, of, style)),
    ...sharedFindings(of.cases).flatMap((one) => [
      spreadHistogram(one, of, style),
      importanceBars(one, of, style),
      spreadScatter(one, 'planet.bondAlbedo', of, style),
    ]),
  ];

  test.each([
    ['wide', wide],
    ['narrow and dark', phone],
  ])('has finite numbers only and says its finding, %s', (_, style) => {
    for (const figure of figures(spreadOf([spreadCase({ zonal: true }), rock]), style)) {
      expect(everyNumber([figure.data, figure.layout]).every(Number.isFinite)).toBe(true);
      expect(figure.textAlternative.length).toBeGreaterThan(20);
      expect(figure.name).toMatch(/^[A-Za-z0-9.-]+$/);
    }
  });

  test('takes text from a scenario as text', () => {
    for (const { data, layout } of figures(odd, wide)) {
      const text = JSON.stringify([data, layout]);
      expect(text).not.toMatch(/<img|<\/script|\u202e/);
    }
  });
});
