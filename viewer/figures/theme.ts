/**
 * Colours of page and figures, light and dark: the one place where they are named (those of maps: `colourScale.ts`).
 *
 * Case colours are the qualitative set of Okabe & Ito (2008) "Color Universal Design (CUD): How to make figures and
 * presentations that are friendly to colorblind people", https://jfly.uni-koeln.de/color/ (codes from memory). Each
 * scheme takes the members of one hue family that stand out from its paper; no meaning rests on colour alone: cases
 * differ in marker, states in dash.
 */
export interface Theme {
  readonly paper: string;
  readonly ink: string;
  /** Secondary text; at least 4.5 : 1 on paper. */
  readonly quiet: string;
  readonly hairline: string;
  /** Fill of a shaded window, translucent so that overlapping windows show. */
  readonly band: string;
  readonly bandEdge: string;
  readonly cases: readonly string[];
}

export const lightTheme: Theme = {
  paper: '#fffefc',
  ink: '#1c2024',
  quiet: '#5c636a',
  hairline: '#dcd9d2',
  band: 'rgba(120, 112, 92, 0.12)',
  bandEdge: '#a49c88',
  cases: ['#0072B2', '#D55E00', '#009E73', '#CC79A7', '#000000'],
};

export const darkTheme: Theme = {
  paper: '#14171b',
  ink: '#e9e7e2',
  quiet: '#a3a9b0',
  hairline: '#343a41',
  band: 'rgba(200, 190, 160, 0.13)',
  bandEdge: '#857e6c',
  cases: ['#56B4E9', '#E69F00', '#009E73', '#CC79A7', '#F0E442'],
};

/** Marker shapes, one a case, out of step with the colours so that the sixth case repeats neither alone. */
export const caseMarkers = ['circle', 'square', 'triangle-up', 'diamond', 'cross', 'star', 'hexagon'] as const;
export type CaseMarker = (typeof caseMarkers)[number];

export function caseColour(theme: Theme, caseIndex: number): string {
  return theme.cases[caseIndex % theme.cases.length]!;
}

export function caseMarker(caseIndex: number): CaseMarker {
  return caseMarkers[caseIndex % caseMarkers.length]!;
}
