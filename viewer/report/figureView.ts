/** A figure on the page: drawn by Plotly, redrawn as the surroundings change, saved on request. */
import type { Config, Layout } from 'plotly.js-dist-min';
import { inCelsius } from '../figures/celsius.ts';
import type { Figure, FigureStyle } from '../figures/figure.ts';
import { figureCsv } from '../figures/figureCsv.ts';
import type { View } from '../figures/view.ts';
import { element } from './element.ts';
import { figurePicture, type Picture, type PictureFormat, type PictureSize, pictureStyle } from './figurePicture.ts';
import { lineSample } from './lineSample.ts';
import { momentLayer } from './momentLayer.ts';
import { plotly } from './plotly.ts';
import { watchPointer } from './pointer.ts';
import { saveFile, saveText } from './saveFile.ts';
import type { Setting } from './surroundings.ts';
import { watchZoom } from './zoom.ts';

export interface FigureView {
  readonly element: HTMLElement;
  /** Call once the element is in the document, and again when the setting has changed. */
  draw(setting: Setting): Promise<void>;
  /** Call when what `build` makes has changed: words and picture, the whole of it. */
  refresh(): Promise<void>;
  /** Another place and other numbers behind the same figure: shown with the next `draw`. */
  renew(number: number, build: Build): void;
  /** The next `draw` shows the whole. */
  leaveZoom(): void;
  /** Marks a share of the period, where the figure shows one; null for none. */
  mark(share: number | null): void;
  /** For a file; it need not be drawn on the page. */
  picture(format: PictureFormat, size: PictureSize): Promise<Picture>;
}

export type Build = (style: FigureStyle) => Figure;

/** A double click is answered by the page: Plotly would go back to the last view that it was given. */
const config: Partial<Config> = { displayModeBar: false, doubleClick: false, showTips: false };
/** Of a picture that the reader saves. */
const savedSize = { svg: { width: 1100, scale: 1 }, png: { width: 1100, scale: 3 } } as const;
/** Below this Plotly has no room between its margins, and writes positions that are no numbers. */
const leastWidth = { wide: 560, narrow: 240 };

/** `build` makes the figure for a style; `number` is its place on the page; `controls` stand above it. */
export function figureView(
  first: number,
  made: Build,
  controls: HTMLElement | null = null,
  pointed: (share: number | null) => void = () => undefined,
): FigureView {
  let number = first;
  let build = made;
  let setting: Setting | null = null;
  let view: View | null = null;
  let drawn: Figure | null = null;
  let marked: number | null = null;
  const plot = element('div', { class: 'plot', role: 'group' });
  const layer = momentLayer(plot);
  const legend = element('ul', { class: 'legend' });
  const whole = button('Show all', () => {
    saving[0]!.focus(); // the button goes
    return show(null);
  });
  whole.hidden = true;
  const saving = [
    ...(['svg', 'png'] as const).map((format) => button(`Save ${format.toUpperCase()}`, () => save(asShown(), format))),
    button('Save CSV', () => saveNumbers(asShown())),
  ];
  const tools = element('p', { class: 'tools' }, whole, ...saving);
  const words = element('figcaption', controls === null ? {} : { 'aria-live': 'polite' });

  /** For a file: read as it is on the page. */
  function asShown(): Build {
    const reading = setting?.style.reading;
    return (style) => asRead(build, reading === undefined ? style : { ...style, reading });
  }

  function say({ title, textAlternative, caption }: Figure): void {
    plot.setAttribute('aria-label', `${title}. ${textAlternative}`);
    const finding = controls === null ? [] : [textAlternative, ' '];
    words.replaceChildren(element('b', {}, `Figure ${number}. ${title}. `), ...finding, caption);
  }

  async function show(part: View | null): Promise<void> {
    if (setting === null) return;
    view = part;
    whole.hidden = view === null;
    const figure = asRead(build, { ...setting.style, view });
    say(figure);
    drawn = figure;
    legend.replaceChildren(...(setting.style.narrow ? legendEntries(figure) : []));
    await plotly().react(plot, figure.data, drawnLayout(figure, setting, widthFor(plot, setting)), config);
    mark(marked);
  }

  function mark(share: number | null): void {
    marked = share;
    layer.show(share === null ? [] : (drawn?.moments?.placesOf(share) ?? []));
  }

  async function draw(changed: Setting): Promise<void> {
    const isFirst = setting === null;
    setting = changed;
    await show(view);
    if (!isFirst) return;
    watchPointer(plot, (x, y) => pointed(x === null ? null : (drawn?.moments?.shareAt(x, y) ?? null)));
    watchZoom(plot, { zoomed: (part) => void show(part), left: () => void show(null) });
    new ResizeObserver(() => void followWidth(plot, setting!).then(() => mark(marked))).observe(plot);
  }

  async function refresh(): Promise<void> {
    await show(null);
  }

  function renew(place: number, next: Build): void {
    number = place;
    build = next;
  }

  return {
    element: element(
      'figure',
      { class: 'chart' },
      controls,
      element('div', { class: 'plot-box' }, plot, layer.element),
      legend,
      element('div', { class: 'under' }, words, tools),
    ),
    draw,
    refresh,
    renew,
    leaveZoom() {
      view = null;
    },
    mark,
    picture: (format, size) => figurePicture(asShown(), format, size),
  };
}

function asRead(build: Build, style: FigureStyle): Figure {
  const figure = build(style);
  return style.reading?.unit === 'degC' ? inCelsius(figure) : figure;
}

function widthFor(plot: HTMLElement, { width, style }: Setting): number {
  return width ?? Math.max(style.narrow ? leastWidth.narrow : leastWidth.wide, plot.clientWidth);
}

async function followWidth(plot: HTMLElement, setting: Setting): Promise<void> {
  const width = widthFor(plot, setting);
  const drawn = (plot as unknown as { readonly layout: Partial<Layout> }).layout.width;
  if (drawn !== width) await plotly().relayout(plot, { width });
}

function drawnLayout({ layout }: Figure, { touch }: Setting, width: number): Partial<Layout> {
  return { ...layout, width, dragmode: touch ? false : 'zoom' };
}

function legendEntries({ lines }: Figure): HTMLElement[] {
  return lines.map((line) => element('li', {}, lineSample(line), element('bdi', {}, line.plainName)));
}

function button(label: string, pressed: () => unknown): HTMLButtonElement {
  const made = element('button', { type: 'button' }, label);
  made.addEventListener('click', () => void pressed());
  return made;
}

async function save(build: Build, format: PictureFormat): Promise<void> {
  const { name, dataUrl } = await figurePicture(build, format, savedSize[format]);
  saveFile(`${name}.${format}`, dataUrl);
}

function saveNumbers(build: Build): void {
  const figure = build(pictureStyle);
  saveText(`${figure.name}.csv`, 'text/csv', figureCsv(figure));
}
