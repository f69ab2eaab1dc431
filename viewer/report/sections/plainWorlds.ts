/** The chart of plain worlds with the cases on it, and the form that reads a heat store back from a lag. */
import type { GridReport } from '../../../sim/studies/grid/gridReport.ts';
import { largestEccentricity } from '../../../sim/studies/grid/plainResponse.ts';
import { lagReader } from '../../../sim/studies/grid/readBack.ts';
import { chartNodes, universalChart } from '../../../sim/studies/grid/universalChart.ts';
import { type MarkedReading, type PlacedCase, placedCases, universalMap } from '../../figures/universalMap.ts';
import { exact } from '../../words/number.ts';
import { readingText } from '../../words/storeReading.ts';
import { choice, numberField } from '../controls.ts';
import { element } from '../element.ts';
import { type FigureView, figureView } from '../figureView.ts';

/** Null where no case is a plain world. */
export function plainWorldsSection(
  report: GridReport,
  number: number,
): { readonly element: HTMLElement; readonly figure: FigureView } | null {
  const placed = placedCases(report.cases);
  if (placed.length === 0) return null;
  const chart = universalChart(chartNodes(placed.map(({ place }) => place)));
  let marked: MarkedReading | null = null;
  const figure = figureView(number, (style) => universalMap(chart, placed, marked, style));
  const { eccentricities, storeNumbers } = chart;
  const isBeyond = (eccentricity: number, storeNumber: number): boolean =>
    eccentricity > eccentricities.at(-1)! || storeNumber < storeNumbers[0]! || storeNumber > storeNumbers.at(-1)!;
  const form = readingForm(placed, isBeyond, (reading) => {
    marked = reading;
    void figure.refresh();
  });
  return {
    element: element(
      'section',
      {},
      element('h2', {}, 'Among all plain worlds'),
      figure.element,
      element('div', { class: 'grid reading' }, form, note()),
    ),
    figure,
  };
}

function note(): HTMLElement {
  return element(
    'aside',
    {},
    element(
      'p',
      {},
      'The lag alone settles the heat-store number; orbit, star and surface of the chosen case make a heat capacity of it.',
    ),
    element(
      'p',
      {},
      'Near the longest lag that an orbit allows, a small error of the lag is a large one of the store.',
    ),
  );
}

const wrong = {
  eccentricity: `Give an eccentricity above 0 and up to ${largestEccentricity}.`,
  lag: 'Give the lag in % of an orbit, above −100 and below 100.',
  plusMinus: 'Give the uncertainty of the lag in % of an orbit, 0 or more.',
};

const beyondChart = 'It lies beyond the chart above.';

function readingForm(
  placed: readonly PlacedCase[],
  isBeyond: (eccentricity: number, storeNumber: number) => boolean,
  marks: (marked: MarkedReading | null) => void,
): HTMLElement {
  const read = lagReader();
  const first = placed[0]!.place;
  const typed = { eccentricity: exact(Number(first.eccentricity.toPrecision(4))), lag: '', plusMinus: '0' };
  let caseAt = 0;
  const answer = element('p', { class: 'reading-answer', role: 'status' });

  function update(): void {
    const eccentricity = number(typed.eccentricity);
    const lag = number(typed.lag);
    const plusMinus = number(typed.plusMinus);
    const faults = [
      eccentricity > 0 && eccentricity <= largestEccentricity ? '' : wrong.eccentricity,
      Math.abs(lag) < 100 ? '' : wrong.lag,
      plusMinus >= 0 && plusMinus < 100 ? '' : wrong.plusMinus,
    ].filter((fault) => fault !== '');
    if (faults.length > 0) {
      answer.replaceChildren(faults.join(' '));
      marks(null);
      return;
    }
    const reading = read({ eccentricity, lag: lag / 100, plusMinus: plusMinus / 100 });
    const beyond = reading.storeNumber !== null && isBeyond(eccentricity, reading.storeNumber) ? [beyondChart] : [];
    answer.replaceChildren([readingText(reading, placed[caseAt]!.place), ...beyond].join(' '));
    const isMarked = reading.storeNumber !== null || reading.low !== null || reading.high !== null;
    marks(isMarked ? { eccentricity, reading } : null);
  }

  const field = (label: string, unit: string, key: keyof typeof typed): HTMLElement =>
    numberField(label, unit, typed[key], (text) => {
      typed[key] = text;
      update();
    });
  const cases = placed.map(({ name }, at) => ({ value: String(at), label: name }));
  const caseChoice = choice('Case', [{ title: 'Cases', options: cases }], String(caseAt), (value) => {
    caseAt = Number(value);
    update();
  });
  answer.append('Type an observed lag to read the heat store that makes it.');
  return element(
    'div',
    { role: 'group', 'aria-label': 'Read the heat store from a lag' },
    element('p', { class: 'controls-title' }, 'The heat store from an observed lag'),
    element(
      'div',
      { class: 'controls' },
      field('Eccentricity', '', 'eccentricity'),
      field('Lag behind periapsis', '% of an orbit', 'lag'),
      field('Its uncertainty, ±', '% of an orbit', 'plusMinus'),
      ...(cases.length > 1 ? [caseChoice] : []),
    ),
    answer,
  );
}

/** A decimal comma is understood; NaN where there is no number. */
function number(text: string): number {
  const plain = text.trim().replace(',', '.').replace('−', '-');
  return plain === '' ? Number.NaN : Number(plain);
}
