import type { ScatterData } from 'plotly.js-dist-min';
import { describe, expect, test } from 'vitest';
import { climateLoop } from '../../../viewer/figures/climateLoop.ts';
import type { FigureStyle } from '../../../viewer/figures/figure.ts';
import { lightTheme } from '../../../viewer/figures/theme.ts';
import { loopCase, loopHalf, plainCase, traceOf } from '../traceFixture.ts';

const style: FigureStyle = { theme: lightTheme, narrow: false, view: null };
const drawn = (trace = traceOf([loopCase()]), how = style) => {
  const figure = climateLoop(trace, how);
  return { figure, traces: figure.data as Partial<ScatterData>[] };
};
const ofPanel = (traces: readonly Partial<ScatterData>[], panel: string, kind: string) =>
  traces.filter(({ yaxis, name }) => yaxis === panel && name!.endsWith(kind));
const ends = ({ x, y }: Partial<ScatterData>) =>
  [0, x!.length - 1].map((at) => `${(x as number[])[at]} ${(y as number[])[at]}`);

describe('climateLoop', () => {
  test.each(['y', 'y2'])('the loop on %s is two stable lines and one unstable between, without a gap', (panel) => {
    const { traces } = drawn();
    const stable = ofPanel(traces, panel, ', stable');
    const unstable = ofPanel(traces, panel, ', unstable');
    expect([stable.length, unstable.length]).toEqual([2, 1]);
    expect(ends(stable[0]!)[1]).toBe(ends(unstable[0]!)[0]);
    expect(ends(unstable[0]!)[1]).toBe(ends(stable[1]!)[0]);
    const points = loopCase().branches[0]!.points.length;
    expect([...stable, ...unstable].reduce((sum, { x }) => sum + x!.length, 0)).toBe(points + 2);
  });

  test('stable is solid, unstable dashed and thinner, both in the colour of the case', () => {
    const { traces } = drawn();
    const [stable] = ofPanel(traces, 'y', ', stable');
    const [unstable] = ofPanel(traces, 'y', ', unstable');
    expect([stable!.line!.dash, unstable!.line!.dash]).toEqual(['solid', 'dash']);
    expect(unstable!.line!.width!).toBeLessThan(stable!.line!.width!);
    expect([stable!.line!.color, unstable!.line!.color]).toEqual([lightTheme.cases[0], lightTheme.cases[0]]);
  });

  test('fold markers stand at the folds, and each is labelled with its value', () => {
    const { traces, figure } = drawn();
    const [marks] = ofPanel(traces, 'y', ', fold');
    const inOrder = (marks!.x as number[]).toSorted((a, b) => a - b);
    expect(inOrder[0]).toBeCloseTo(1.07 - loopHalf, 12);
    expect(inOrder[1]).toBeCloseTo(1.07 + loopHalf, 12);
    const labels = figure.layout.annotations!.map(({ text }) => text!.replaceAll('\u00a0', ' '));
    expect(labels).toContain('warm climate ends<br><b>0.930 Lsun</b>');
    expect(labels).toContain('cold climate ends<br><b>1.210 Lsun</b>');
  });

  test('the warm climate jumps down and the cold one up, to a climate that is there', () => {
    const { traces } = drawn();
    const jumps = traces.filter(({ name }) => name!.endsWith(', jump'));
    expect(jumps.map(({ marker }) => marker!.symbol)).toEqual(['triangle-down', 'triangle-up']);
    for (const { x, y } of jumps) {
      // The cubic's third root at a fold lies at s = ∓2/√3, by hand; half a kelvin for the straight lines between points.
      const s = (Number(x![0]) < 1.07 ? -2 : 2) / Math.sqrt(3);
      expect(Math.abs(Number(y![2]) - (255 + 32 * s))).toBeLessThan(0.5);
    }
  });

  test('a logarithmic axis has its ranges and labels as logarithms, its lines and shading as values', () => {
    const { figure } = drawn(traceOf([loopCase()], { log: true }));
    const { xaxis, shapes, annotations } = figure.layout;
    expect(xaxis!.type).toBe('log');
    expect(xaxis!.range).toEqual([Math.log10(0.8), Math.log10(1.35)]);
    expect(shapes![0]!.x0).toBeCloseTo(0.93, 12);
    const label = annotations!.find(({ text }) => text!.startsWith('warm climate ends'));
    expect(label!.x).toBeCloseTo(Math.log10(0.93), 12);
  });

  test('holds nothing but finite numbers, whatever the cases', () => {
    for (const trace of [
      traceOf([loopCase(), plainCase()]),
      traceOf([plainCase()]),
      traceOf([{ ...plainCase(), branches: [{ ended: 'stuck', points: [] }] }]),
    ]) {
      for (const narrow of [false, true]) {
        const { figure } = drawn(trace, { ...style, narrow });
        const odd: string[] = [];
        JSON.stringify(figure, (key, value) => {
          if (typeof value === 'number' && !Number.isFinite(value)) odd.push(key);
          return value;
        });
        expect(odd).toEqual([]);
      }
    }
  });

  test('without sight: the folds, their temperatures and what is left', () => {
    const text = drawn().figure.textAlternative.replaceAll('\u00a0', ' ');
    expect(text).toMatch(
      /^ice world: the warm climate ends in a fold at 0\.930 Lsun, at a mean of 273\.5 K, and what is left is one at 218\.\d K; the cold climate ends in a fold at 1\.210 Lsun, at a mean of 236\.5 K/,
    );
    expect(drawn(traceOf([plainCase()])).figure.textAlternative).toBe(
      'bare rock: no climate ends at a fold within the range.',
    );
  });
});
