/**
 * Colours of maps, from the least value to the greatest. Their lightness rises at an even pace, so that equal steps look
 * equal, in grey print and to every kind of colour vision as well. Light and dark pages share them: a colour keeps its meaning.
 */

/** Evenly spaced stops, `#rrggbb`; straight lines in sRGB between. */
export type ColourScale = readonly string[];

/**
 * Cold to hot: cividis, made for colour-blind readers. Nuñez, Anderton & Renslow (2018) "Optimizing colormaps with
 * consideration for color vision deficiency to enable accurate interpretation of scientific data", PLoS ONE 13(7) e0199239.
 * Every fifteenth of its 256 colours.
 */
export const temperatureScale: ColourScale = [
  '#00204c',
  '#002a66',
  '#00346e',
  '#273f6c',
  '#3c4a6b',
  '#4c556b',
  '#5b5f6d',
  '#686a70',
  '#757575',
  '#838178',
  '#928c78',
  '#a19876',
  '#b0a572',
  '#c0b16d',
  '#d1bf66',
  '#e1cc5c',
  '#f3db4f',
  '#ffe945',
];

/**
 * Darkness to light: inferno, black where nothing arrives. S. van der Walt & N. Smith (2015), made in CAM02-UCS for
 * matplotlib, public domain (CC0). Every sixteenth of its 256 colours, and the last.
 */
export const insolationScale: ColourScale = [
  '#000004',
  '#0b0724',
  '#210c4a',
  '#3d0965',
  '#57106e',
  '#71196e',
  '#8a226a',
  '#a32c61',
  '#bc3754',
  '#d24644',
  '#e45a31',
  '#f1731d',
  '#f98e09',
  '#fcac11',
  '#f9cb35',
  '#f2ea69',
  '#fcffa4',
];

/** As Plotly takes it. */
export function plotlyScale(scale: ColourScale): [number, string][] {
  return scale.map((colour, stop) => [stop / (scale.length - 1), colour]);
}

/** The colour of a value between `from` and `to`; beyond them the nearest end's. */
export function colourAt(scale: ColourScale, value: number, [from, to]: readonly [number, number]): string {
  const share = to > from ? Math.min(1, Math.max(0, (value - from) / (to - from))) : 0;
  const place = share * (scale.length - 1);
  const stop = Math.min(scale.length - 2, Math.floor(place));
  const [low, high] = [channels(scale[stop]!), channels(scale[stop + 1]!)];
  const mixed = low.map((value, channel) => Math.round(value + (place - stop) * (high[channel]! - value)));
  return `#${mixed.map((value) => value.toString(16).padStart(2, '0')).join('')}`;
}

/** Black or white, whichever stands out more from `ground`: always by 4.5 : 1 or more. */
export function inkOn(ground: string): '#000000' | '#ffffff' {
  const luminance = relativeLuminance(ground);
  return (luminance + 0.05) / 0.05 >= 1.05 / (luminance + 0.05) ? '#000000' : '#ffffff';
}

/** 0 black … 1 white. Source: W3C, WCAG 2.2, "relative luminance". */
export function relativeLuminance(colour: string): number {
  const [red, green, blue] = channels(colour).map((value) => {
    const share = value / 255;
    return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
  }) as [number, number, number];
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function channels(colour: string): number[] {
  return [1, 3, 5].map((at) => Number.parseInt(colour.slice(at, at + 2), 16));
}
