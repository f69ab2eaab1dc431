/** A short piece of a line with its marker, as it looks in the figures: for legends and table heads. */
import type { Dash, LineLook } from '../figures/chartLine.ts';
import { type CaseMarker, caseMarker, lightTheme } from '../figures/theme.ts';
import type { Column } from '../words/columns.ts';
import { svgElement } from './element.ts';

const dashes: Readonly<Record<Dash, string>> = { solid: 'none', dash: '6 3', dot: '1.5 3', dashdot: '6 2.5 1.5 2.5' };

/** Outlines round (0, 0), some 9 units across. */
const outlines: Readonly<Record<CaseMarker, string>> = {
  circle: 'M4.5 0A4.5 4.5 0 1 1 -4.5 0A4.5 4.5 0 1 1 4.5 0Z',
  square: 'M-4 -4H4V4H-4Z',
  'triangle-up': 'M0 -5L4.8 3.4H-4.8Z',
  diamond: 'M0 -5.4L5.4 0L0 5.4L-5.4 0Z',
  cross: 'M-1.7 -5H1.7V-1.7H5V1.7H1.7V5H-1.7V1.7H-5V-1.7H-1.7Z',
  star: 'M0 -5.6L1.4 -1.8H5.4L2.2 0.7L3.4 4.6L0 2.2L-3.4 4.6L-2.2 0.7L-5.4 -1.8H-1.4Z',
  hexagon: 'M-2.6 -4.5H2.6L5.2 0L2.6 4.5H-2.6L-5.2 0Z',
};

/** Colours may be any that CSS knows. */
export function lineSample({ colour, dash, marker, ground, casing }: LineLook): SVGSVGElement {
  const sign = marker
    ? svgElement('path', {
        d: outlines[marker.shape],
        transform: 'translate(17 7)',
        fill: marker.open ? 'var(--paper)' : colour,
        stroke: colour,
        'stroke-width': marker.open ? '1.5' : '0',
      })
    : null;
  return svgElement(
    'svg',
    { class: 'sample', viewBox: '0 0 34 14', 'aria-hidden': 'true' },
    ground === undefined ? null : svgElement('path', { d: 'M0 0H34V14H0Z', fill: ground }),
    casing === undefined ? null : stroke(casing, 4, 'solid'),
    stroke(colour, marker ? 2.5 : 1.5, dash),
    sign,
  );
}

function stroke(colour: string, width: number, dash: Dash): SVGPathElement {
  return svgElement('path', {
    d: 'M1 7H33',
    fill: 'none',
    stroke: colour,
    'stroke-width': String(width),
    'stroke-dasharray': dashes[dash],
  });
}

/** The sample of a column: its colour follows the scheme by itself. */
export function columnSample({ caseIndex, stateIndex, state }: Column): SVGSVGElement {
  const stableDash = stateIndex === 0 ? 'solid' : 'dashdot';
  const dash = state.stable === false ? 'dot' : stableDash;
  return lineSample({
    colour: caseVariable(caseIndex),
    dash,
    marker: { shape: caseMarker(caseIndex), open: stateIndex > 0 },
  });
}

/** The sample of a case as a whole. */
export function caseSample(caseIndex: number): SVGSVGElement {
  const marker = { shape: caseMarker(caseIndex), open: false };
  return lineSample({ colour: caseVariable(caseIndex), dash: 'solid', marker });
}

function caseVariable(caseIndex: number): string {
  return `var(--case-${caseIndex % lightTheme.cases.length})`;
}
