/** The themes as CSS variables, so that page and figures share their colours. Used by the build. */
import { darkTheme, lightTheme, type Theme } from '../figures/theme.ts';

/** Light by default and on paper, dark where the reader's system is. */
export function themeCss(): string {
  return `:root{${variables(lightTheme)}}@media screen and (prefers-color-scheme:dark){:root{${variables(darkTheme)}}}`;
}

function variables(theme: Theme): string {
  const cases = theme.cases.map((colour, index) => `--case-${index}:${colour}`);
  const { paper, ink, quiet, hairline, bandEdge } = theme;
  return [
    `--paper:${paper}`,
    `--ink:${ink}`,
    `--quiet:${quiet}`,
    `--hairline:${hairline}`,
    `--edge:${bandEdge}`,
    ...cases,
  ].join(';');
}
