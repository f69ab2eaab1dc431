/** What the page is shown on: light or dark, wide or narrow, screen or paper. */
import type { FigureStyle } from '../figures/figure.ts';
import { darkTheme, lightTheme } from '../figures/theme.ts';

const dark = matchMedia('(prefers-color-scheme: dark)');
const narrow = matchMedia('screen and (max-width: 46rem)');
/** Fingers scroll the page; they must not draw zoom boxes. */
const touch = matchMedia('(pointer: coarse)');

/** Printable width of A4 with 15 mm margins, in CSS pixels; Letter is wider. */
const paperWidth = 680;

export interface Setting {
  readonly style: Omit<FigureStyle, 'view'>;
  /** Fixed width in CSS pixels, or null to fill the page. */
  readonly width: number | null;
  readonly touch: boolean;
}

export function screenSetting(): Setting {
  const style = { theme: dark.matches ? darkTheme : lightTheme, narrow: narrow.matches };
  return { style, width: null, touch: touch.matches };
}

/** Paper is light whatever the screen is. */
export function paperSetting(): Setting {
  return { style: { theme: lightTheme, narrow: true }, width: paperWidth, touch: false };
}

/** Calls back with the new setting whenever one of these changes. */
export function watchSurroundings(changed: (setting: Setting) => void): void {
  for (const query of [dark, narrow, touch]) query.addEventListener('change', () => changed(screenSetting()));
  addEventListener('beforeprint', () => changed(paperSetting()));
  addEventListener('afterprint', () => changed(screenSetting()));
}
