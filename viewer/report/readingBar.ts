/** How the figures are to be read: across what, in which unit, beside what. The browser's own controls. */
import { type AxisName, plainReading, type Reading } from '../figures/reading.ts';
import { controlRow, labelled, shortened } from './controls.ts';
import { element } from './element.ts';

/** What there is to choose from. */
export interface ReadingChoices {
  readonly axes: readonly AxisName[];
  /** Cases from which differences can be shown; fewer than two leave the choice out. */
  readonly cases: readonly string[];
}

export interface ReadingBar {
  readonly element: HTMLElement;
  offer(choices: ReadingChoices): void;
  show(reading: Reading): void;
}

const axisLabels: Readonly<Record<AxisName, string>> = {
  time: 'time after periapsis',
  phase: 'share of the period',
  trueAnomaly: 'true anomaly',
  date: 'date',
  solarLongitude: 'solar longitude',
};

const units = [
  ['K', 'kelvin'],
  ['degC', 'degrees Celsius'],
] as const;

export function readingBar(changed: (reading: Reading) => void): ReadingBar {
  let reading = plainReading;
  const change = (part: Partial<Reading>) => {
    reading = { ...reading, ...part };
    changed(reading);
  };
  const axis = element('select', {});
  axis.addEventListener('change', () => change({ axis: axis.value as AxisName }));
  const unit = element('select', {}, ...units.map(([value, label]) => element('option', { value }, label)));
  unit.addEventListener('change', () => change({ unit: unit.value as Reading['unit'] }));
  const against = element('select', {});
  against.addEventListener('change', () => change({ against: against.value === '' ? null : against.value }));
  const againstLabel = labelled('Difference from', against);

  function show(next: Reading): void {
    reading = next;
    axis.value = next.axis;
    unit.value = next.unit;
    against.value = next.against ?? '';
  }

  return {
    element: controlRow(
      'How the figures are read',
      labelled('Through the orbit by', axis),
      labelled('Temperatures in', unit),
      againstLabel,
    ),
    offer({ axes, cases }) {
      axis.replaceChildren(...axes.map((value) => element('option', { value }, axisLabels[value])));
      against.replaceChildren(
        element('option', { value: '' }, 'nothing'),
        ...cases.map((name) => element('option', { value: name }, shortened(name))),
      );
      againstLabel.hidden = cases.length < 2;
      show(reading);
    },
    show,
  };
}
