/** A figure with its temperatures in degrees Celsius: data, axes, colour bars, and the numbers in its words. Pure. */
import type { Data, Layout } from 'plotly.js-dist-min';
import { zeroCelsius } from '../../sim/constants.ts';
import { fixed } from '../words/number.ts';
import type { Figure } from './figure.ts';
import type { Moments } from './moments.ts';

type Json = Record<string, unknown>;

/** Differences of temperature stay in kelvin: their axes do not say `Temperature`, and their numbers carry a sign. */
export function inCelsius(figure: Figure): Figure {
  const axes = temperatureAxes(figure.layout);
  return {
    ...figure,
    textAlternative: words(figure.textAlternative),
    caption: words(figure.caption),
    data: figure.data.map((trace) => traceInCelsius(trace as unknown as Json, axes)),
    layout: layoutInCelsius(figure.layout, axes),
    ...(figure.moments && axes.has('y') ? { moments: momentsInCelsius(figure.moments) } : {}),
  };
}

function momentsInCelsius({ shareAt, placesOf }: Moments): Moments {
  return {
    shareAt: (x, y) => shareAt(x, y + zeroCelsius),
    placesOf: (share) =>
      placesOf(share).map((place) => (place.y === null ? place : { ...place, y: place.y - zeroCelsius })),
  };
}

const axisTitle = /^(?:Area-mean |Mean )?[Tt]emperature.* \(K\)$/;

function titleOf(part: unknown): string {
  const title = (part as { title?: { text?: unknown } } | undefined)?.title?.text;
  return typeof title === 'string' ? title : '';
}

/** `x`, `y2`: as traces name them. */
function temperatureAxes(layout: Partial<Layout>): ReadonlySet<string> {
  const found = Object.entries(layout).filter(
    ([key, part]) => /^[xy]axis\d*$/.test(key) && axisTitle.test(titleOf(part)) && !titleOf(part).includes('minus'),
  );
  return new Set(found.map(([key]) => key.replace('axis', '')));
}

function traceInCelsius(trace: Json, axes: ReadonlySet<string>): Data {
  const moved: Json = { ...trace };
  for (const letter of ['x', 'y'] as const) {
    const axis = (trace[`${letter}axis`] as string | undefined) ?? letter;
    if (axes.has(axis) && trace[letter] !== undefined) moved[letter] = shifted(trace[letter]);
  }
  if (axisTitle.test(titleOf(trace.colorbar))) {
    for (const key of ['z', 'zmin', 'zmax']) if (trace[key] !== undefined) moved[key] = shifted(trace[key]);
    moved.colorbar = withTitle(trace.colorbar as Json);
  }
  const marker = trace.marker as Json | undefined;
  if (marker && axisTitle.test(titleOf(marker.colorbar))) {
    moved.marker = {
      ...marker,
      color: shifted(marker.color),
      ...(marker.cmin === undefined ? {} : { cmin: shifted(marker.cmin), cmax: shifted(marker.cmax) }),
      colorbar: withTitle(marker.colorbar as Json),
    };
  }
  if (trace.type === 'contour' && namesTemperature.test(String(trace.name))) {
    const contours = trace.contours as Json;
    moved.z = shifted(trace.z);
    moved.contours = { ...contours, start: shifted(contours.start), end: shifted(contours.end) };
  }
  const isMoved = moved.x !== trace.x || moved.y !== trace.y || moved.z !== trace.z || moved.marker !== trace.marker;
  if (isMoved && typeof trace.hovertemplate === 'string') {
    moved.hovertemplate = trace.hovertemplate.replaceAll(/(%\{[xyz][^}]*\}) K/g, '$1 °C');
  }
  if (
    Array.isArray(trace.customdata) &&
    isMoved &&
    /customdata\[\d\]:\.1f\} (?:to|K)/.test(String(trace.hovertemplate))
  ) {
    moved.customdata = shifted(trace.customdata);
    moved.hovertemplate = String(moved.hovertemplate).replaceAll(/(%\{customdata[^}]*\}) K/g, '$1 °C');
  }
  for (const key of ['name', 'text', 'customdata', 'hovertemplate'] as const) {
    if (moved[key] !== undefined) moved[key] = wordsIn(moved[key]);
  }
  return moved as unknown as Data;
}

/** A line of a map that stands for a temperature is called by it. */
const namesTemperature = /^[\d.]+[\u00a0 ]K\b/;

function layoutInCelsius(layout: Partial<Layout>, axes: ReadonlySet<string>): Partial<Layout> {
  const moved: Json = { ...layout };
  for (const axis of axes) {
    const key = `${axis[0]}axis${axis.slice(1)}`;
    const part = withTitle((layout as Json)[key] as Json);
    if (part.range !== undefined) part.range = shifted(part.range);
    if (part.tickvals !== undefined) part.tickvals = shifted(part.tickvals);
    moved[key] = part;
  }
  moved.shapes = layout.shapes?.map((shape) => {
    const own = placed(shape as unknown as Json, axes, ['0', '1']);
    return own.name === undefined ? own : { ...own, name: wordsIn(own.name) };
  });
  moved.annotations = layout.annotations?.map((note) => {
    const own = placed(note as unknown as Json, axes, ['']);
    return { ...own, text: wordsIn(own.text) };
  });
  for (const key of ['shapes', 'annotations']) if (moved[key] === undefined) delete moved[key];
  return moved as Partial<Layout>;
}

/** A shape or a note whose place is a temperature. */
function placed(part: Json, axes: ReadonlySet<string>, ends: readonly string[]): Json {
  const moved = { ...part };
  for (const letter of ['x', 'y']) {
    if (!axes.has(String(part[`${letter}ref`] ?? letter))) continue;
    for (const end of ends) {
      const key = `${letter}${end}`;
      if (typeof part[key] === 'number') moved[key] = shifted(part[key]);
    }
  }
  return moved;
}

function withTitle(part: Json): Json {
  const title = part.title as Json;
  return { ...part, title: { ...title, text: String(title.text).replace('(K)', '(°C)') } };
}

function shifted(value: unknown): unknown {
  if (typeof value === 'number') return value - zeroCelsius;
  if (Array.isArray(value) || ArrayBuffer.isView(value)) return Array.from(value as ArrayLike<unknown>, shifted);
  return value;
}

function wordsIn(value: unknown): unknown {
  if (typeof value === 'string') return words(value);
  return Array.isArray(value) ? value.map(wordsIn) : value;
}

/** `279.1 K` → `6.0 °C`; what has a sign before it is a difference. */
function words(text: string): string {
  return text.replaceAll(/(?<![+−\-\d.])(\d+(?:\.\d+)?)([\u00a0 ])K(?![\w⁻/])/g, (_, number: string, space: string) => {
    const decimals = number.split('.')[1]?.length ?? 0;
    return `${fixed(Number(number) - zeroCelsius, decimals)}${space}°C`;
  });
}
