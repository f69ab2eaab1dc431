import { describe, expect, test } from 'vitest';
import { caseMarkers, darkTheme, lightTheme, type Theme } from '../../../viewer/figures/theme.ts';

/** W3C, Web Content Accessibility Guidelines 2.2, definitions of relative luminance and contrast ratio. */
function luminance(hex: string): number {
  const [r, g, b] = [1, 3, 5].map((at) => {
    const c = Number.parseInt(hex.slice(at, at + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [dim, bright] = [luminance(a), luminance(b)].sort((x, y) => x - y) as [number, number];
  return (bright + 0.05) / (dim + 0.05);
}

test('contrast: black on white is 21 : 1 (WCAG 2.2)', () => {
  expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 12);
});

describe.each([
  ['light', lightTheme],
  ['dark', darkTheme],
] as const)('%s theme', (_, theme: Theme) => {
  test('words reach WCAG AA, 4.5 : 1', () => {
    for (const ink of [theme.ink, theme.quiet]) expect(contrast(ink, theme.paper)).toBeGreaterThanOrEqual(4.5);
  });

  test('lines reach WCAG AA for graphics, 3 : 1', () => {
    for (const colour of theme.cases) expect(contrast(colour, theme.paper)).toBeGreaterThanOrEqual(3);
  });

  test('no colour twice; colours and markers repeat out of step', () => {
    expect(new Set(theme.cases).size).toBe(theme.cases.length);
    const signs = Array.from({ length: 35 }, (_unused, i) => `${i % theme.cases.length} ${i % caseMarkers.length}`);
    expect(new Set(signs).size).toBe(35);
  });
});
