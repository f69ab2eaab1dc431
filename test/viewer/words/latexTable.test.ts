import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { columnsOf } from '../../../viewer/words/columns.ts';
import { latexTable, latexText } from '../../../viewer/words/latexTable.ts';
import { numbersTable } from '../../../viewer/words/numbersTable.ts';
import { plainRun, withFindings } from '../fixture.ts';

const nasty = "\\ { } $ & # _ % ~ ^ < > | \" [ ] * -- '' `` ?` ,,";

/** Commands of ours and what a reader sees of them; whatever else is left over is what LaTeX would read as its own. */
function asSet(latex: string): { text: string; left: string } {
  const commands: readonly (readonly [RegExp, string])[] = [
    [/\\textbackslash\{\}/g, '\\'],
    [/\\textasciitilde\{\}/g, '~'],
    [/\\textasciicircum\{\}/g, '^'],
    [/\\textless\{\}/g, '<'],
    [/\\textgreater\{\}/g, '>'],
    [/\\textbar\{\}/g, '|'],
    [/\\char34\{\}/g, '"'],
    [/\\([{}$&#_%])/g, '$1'],
    [/\{([[\]*])\}/g, '$1'],
    [/\{\}/g, ''],
  ];
  // each command is taken away once for what is left and once for the text
  const kept: string[] = [];
  let rest = latex;
  for (const [pattern, seen] of commands) {
    rest = rest.replace(pattern, (_, inner: string) => {
      kept.push(seen === '$1' ? inner : seen);
      return `\u{e000}${kept.length - 1}\u{e001}`;
    });
  }
  const text = rest.replace(/\u{e000}(\d+)\u{e001}/gu, (_, at: string) => kept[Number(at)]!);
  return { text, left: rest.replace(/\u{e000}\d+\u{e001}/gu, '') };
}

describe('latexText', () => {
  test('every special character is set as itself', () => {
    const { text, left } = asSet(latexText(nasty));
    expect(text).toBe(nasty);
    expect(left).not.toMatch(/[\\{}$&#_%~^<>|"[\]*]/);
  });

  test('any text: nothing is left that LaTeX would read, and no line end', () => {
    const text = fc.string({ unit: fc.constantFrom(...nasty, 'a', '漢', '\n', '\t', '\u202e', '\ud800') });
    fc.assert(
      fc.property(text, (original) => {
        const latex = latexText(original);
        const { text: seen, left } = asSet(latex);
        expect(left).not.toMatch(/[\\{}$&#_%~^<>|"[\]*\n\r\p{C}]/u);
        expect(seen).toBe(original.replace(/[\n\t]/g, ' ').replace(/\p{C}/gu, ''));
      }),
    );
  });

  test('characters do not join into others', () => {
    expect(latexText('a--b')).toBe('a-{}-b');
    expect(latexText('?`')).toBe('?{}`');
  });

  test('signs of our own labels', () => {
    expect(latexText('45°\u00a0N, “sea”, W\u00a0m⁻²\u00a0K⁻¹')).toBe(
      "45$^{\\circ}$~N, {``}sea{''}, W~m$^{-2}$~K$^{-1}$",
    );
  });
});

describe('latexTable', () => {
  const run = plainRun({
    cases: [
      { name: nasty, heatCapacity: 2e6 },
      { name: '[b] & c', heatCapacity: 8e7 },
    ],
  });
  const latex = latexTable(numbersTable(columnsOf(withFindings(run, { lagOfMax: null }))), '0.1.0');
  const rows = latex.split('\n').filter((line) => line.endsWith('\\\\'));

  test('every row has the cells of its columns', () => {
    expect(latex).toContain('\\begin{tabular}{lrr}');
    for (const row of rows) {
      const cells = row.replaceAll(/\\./g, '').split('&').length;
      expect(cells).toBe(row.startsWith('\\multicolumn{3}') ? 1 : 3);
    }
    expect(rows.length).toBeGreaterThan(15);
  });

  test('numbers in mathematics, with their errors; units raised; what is missing is said beneath', () => {
    expect(latex).toMatch(/^Mean temperature \(K\) & \$\d+\.\d+\$ & \$/m);
    expect(latex).toMatch(/ & --- & --- \\\\$/m);
    expect(latex).toMatch(/^\\par Lag .*there is none\.$/m);
    const wide = withFindings(run, {});
    const state = wide.cases[0]!.states[0]!;
    const findings = state.findings.map((one) =>
      one.name === 'temperatureMin'
        ? { ...one, plusMinus: 0.3 }
        : one.name === 'damping'
          ? { ...one, unit: 'W/m2' }
          : one,
    );
    const changed = { ...wide, cases: [{ ...wide.cases[0]!, states: [{ ...state, findings }] }] };
    const again = latexTable(numbersTable(columnsOf(changed)), '0');
    expect(again).toMatch(/^Minimum temperature \(K\) & \$[\d.]+ \\pm 0\.30\$/m);
    expect(again).toMatch(/\(W\\,m\$\^\{-2\}\$\) & /);
  });

  test('braces and dollars of the whole are in pairs', () => {
    const bare = latex.replaceAll(/\\[{}$&#_%]/g, '').replaceAll(/^%.*$/gm, '');
    expect(bare.split('{').length).toBe(bare.split('}').length);
    expect((bare.split('$').length - 1) % 2).toBe(0);
  });
});
