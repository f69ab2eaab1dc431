/** One moment of the orbit, by hand: a slider, and what every case has then. The same moment is marked on every figure. */

import { zeroCelsius } from '../../sim/constants.ts';
import { momentValues } from '../figures/moments.ts';
import type { Reading } from '../figures/reading.ts';
import { type Column, commonTimeUnit, periodOf } from '../words/columns.ts';
import { duration, fixed, nbsp, percent, significant, unitText } from '../words/number.ts';
import { element, userText } from './element.ts';
import { caseSample } from './lineSample.ts';

export interface MomentBar {
  readonly element: HTMLElement;
  offer(columns: readonly Column[]): void;
  /** Null for none. */
  show(share: number | null, unit: Reading['unit']): void;
}

const steps = 1000;
/** With more the temperatures alone are told. */
const mostInFull = 6;

export function momentBar(moved: (share: number | null) => void): MomentBar {
  let columns: readonly Column[] = [];
  let last: Parameters<MomentBar['show']> = [null, 'K'];
  const slider = element('input', { type: 'range', min: '0', max: String(steps), step: '1', value: '0', id: 'moment' });
  const none = element('button', { type: 'button' }, 'No moment');
  const when = element('output', { for: 'moment' });
  const list = element('ul', { class: 'moment-values' });
  slider.addEventListener('input', () => moved(slider.valueAsNumber / steps));
  none.addEventListener('click', () => {
    slider.focus(); // the button goes
    moved(null);
  });

  function show(...[share, unit]: Parameters<MomentBar['show']>): void {
    last = [share, unit];
    none.hidden = share === null;
    if (share === null || columns.length === 0) {
      when.textContent = 'none';
      slider.setAttribute('aria-valuetext', 'no moment');
      list.replaceChildren();
      return;
    }
    if (document.activeElement !== slider) slider.value = String(Math.round(share * steps));
    const values = momentValues(columns, share);
    const time = commonTimeUnit(columns);
    const periods = columns.map(periodOf);
    const isShared = periods.every((period) => period === periods[0]);
    const text = isShared
      ? `${duration(values[0]!.time, time)} after periapsis`
      : `${percent(share)} of the period after periapsis`;
    when.textContent = text;
    const isFull = values.length <= mostInFull;
    list.classList.toggle('many', !isFull);
    const words = values.map(({ temperature, steady, instellation }) => {
      if (!isFull) return shown(temperature, unit);
      return [
        shown(temperature, unit),
        `steady ${shown(steady, unit)}`,
        `${significant(instellation, 4)}${nbsp}${unitText('W/m2')}`,
      ].join(', ');
    });
    slider.setAttribute('aria-valuetext', `${text}: ${values.map(({ name }, i) => `${name} ${words[i]}`).join('; ')}`);
    list.replaceChildren(
      ...values.map(({ name, caseIndex }, i) =>
        element('li', {}, caseSample(caseIndex), element('span', {}, userText(name), ` ${words[i]}`)),
      ),
    );
  }

  const box = element(
    'div',
    { class: 'moment-bar', role: 'group', 'aria-label': 'One moment on every figure' },
    element('label', { for: 'moment' }, 'Moment'),
    element('span', { class: 'track' }, slider),
    when,
    none,
    list,
  );
  return {
    element: box,
    offer(next) {
      columns = next;
      box.hidden = columns.length === 0;
      show(...last);
    },
    show,
  };
}

function shown(temperature: number, unit: Reading['unit']): string {
  return unit === 'K' ? `${fixed(temperature, 1)}${nbsp}K` : `${fixed(temperature - zeroCelsius, 1)}${nbsp}°C`;
}
