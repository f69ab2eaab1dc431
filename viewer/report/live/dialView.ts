/** One number that a reader may move: a slider for the hand, a field for an exact value, the way back. */
import { formatNumber, inUnit } from '../../../sim/quantity/format.ts';
import type { Dial } from '../../../sim/scenario/dial.ts';
import { element } from '../element.ts';

export interface DialView {
  readonly element: HTMLElement;
  /** `text` stands in the scenario now, `value` is it in SI, null where it is none. */
  show(text: string, value: number | null, isMoved: boolean): void;
  /** What is wrong with the text that stands here; null for nothing. */
  complain(message: string | null): void;
}

/** Steps that a slider has over its range, about. */
const steps = 300;

/** `moved` is called with the text for the scenario, or null for the way back. */
export function dialView(dial: Dial, moved: (text: string | null) => void): DialView {
  const scale = scaleOf(dial);
  const id = `dial-${dial.key.replaceAll('.', '-')}`;
  const slider = element('input', {
    type: 'range',
    id,
    min: String(scale.min),
    max: String(scale.max),
    step: String(scale.step),
  });
  const field = element('input', { type: 'text', autocomplete: 'off', spellcheck: 'false', 'aria-label': dial.label });
  const back = element(
    'button',
    {
      type: 'button',
      class: 'back',
      title: `Back to ${dial.text}`,
      'aria-label': `${dial.label} back to ${dial.text}`,
    },
    '↺',
  );
  const fault = element('p', { class: 'fault', role: 'alert' });
  const mark = element('span', { class: 'was-mark', 'aria-hidden': 'true' });
  mark.style.setProperty('--at', String(shareOf(scale, dial.value)));
  slider.addEventListener('input', () => moved(scale.text(slider.valueAsNumber)));
  field.addEventListener('change', () => moved(typed(field.value, dial)));
  back.addEventListener('click', () => {
    slider.focus();
    moved(null);
  });
  return {
    element: element(
      'div',
      { class: 'dial', title: dial.description },
      element('label', { for: id }, dial.label),
      back,
      field,
      element('span', { class: 'track' }, mark, slider),
      fault,
    ),
    show(text, value, isMoved) {
      if (document.activeElement !== field || field.value === '') field.value = text;
      slider.setAttribute('aria-valuetext', text);
      const place = value === null ? null : scale.place(value);
      if (place !== null && Math.abs(slider.valueAsNumber - place) > scale.step) slider.valueAsNumber = place;
      back.disabled = !isMoved;
      back.parentElement?.classList.toggle('moved', isMoved);
    },
    complain(message) {
      fault.textContent = message ?? '';
      if (message === null) field.removeAttribute('aria-invalid');
      else field.setAttribute('aria-invalid', 'true');
    },
  };
}

/** A bare number stands in the unit of the dial; nothing is the way back. */
function typed(text: string, { unit }: Dial): string | null {
  const written = text.trim().replaceAll('−', '-');
  if (written === '') return null;
  const isBare = /^[-+]?(?:\d+\.?\d*|\.\d+)(?:e[-+]?\d+)?$/i.test(written);
  return isBare && unit !== '1' ? `${written} ${unit}` : written;
}

interface Scale {
  readonly min: number;
  readonly max: number;
  readonly step: number;
  /** The slider's place → text for a scenario. */
  text(place: number): string;
  /** SI → the slider's place. */
  place(value: number): number;
}

/** In the dial's own unit, so that steps are round numbers there; on a logarithmic one three digits. */
function scaleOf({ unit, low, high, log }: Dial): Scale {
  const [from, to] = [inUnit(low, unit), inUnit(high, unit)];
  const withUnit = (number: string) => (unit === '1' ? number : `${number} ${unit}`);
  if (log) {
    const [min, max] = [Math.log10(from), Math.log10(to)];
    return {
      min,
      max,
      step: (max - min) / steps,
      text: (place) => withUnit(formatNumber(Math.min(to, Math.max(from, 10 ** place)), 3)),
      place: (value) => Math.log10(Math.max(inUnit(value, unit), Number.MIN_VALUE)),
    };
  }
  const step = roundStep((to - from) / steps);
  return {
    min: from,
    max: to,
    step,
    text: (place) => withUnit(formatNumber(from + Math.round((place - from) / step) * step, 6)),
    place: (value) => inUnit(value, unit),
  };
}

function shareOf(scale: Scale, value: number): number {
  const share = (scale.place(value) - scale.min) / (scale.max - scale.min);
  return Math.min(1, Math.max(0, share));
}

/** 1, 2 or 5 times a power of ten, at most `wanted`. */
function roundStep(wanted: number): number {
  const power = 10 ** Math.floor(Math.log10(wanted));
  const times = [5, 2, 1].find((factor) => factor * power <= wanted * (1 + 1e-9)) ?? 1;
  return times * power;
}
