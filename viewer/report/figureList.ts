/** The figures of a page, each with a name by which it is known again when the numbers behind it have moved. */
import type { Figure, FigureStyle } from '../figures/figure.ts';
import { plainReading, type Reading } from '../figures/reading.ts';
import type { Column } from '../words/columns.ts';
import { controlRow, labelled, shortened } from './controls.ts';
import { element } from './element.ts';
import { type FigureView, figureView } from './figureView.ts';
import { momentBar } from './momentBar.ts';
import { type ReadingChoices, readingBar } from './readingBar.ts';
import type { Setting } from './surroundings.ts';

export interface FigureBuilder {
  readonly id: string;
  /** `chosen` is the place among the options of `choice`; 0 without one. */
  readonly build: (style: FigureStyle, chosen: number) => Figure;
  /** What the figure shows one of at a time. */
  readonly choice?: { readonly label: string; readonly options: readonly string[] };
}

export interface FigureList {
  readonly element: HTMLElement;
  /** All that are there now. */
  views(): readonly FigureView[];
  /** Other numbers: figures in view are drawn at once, the others when they come into view. */
  show(builders: readonly FigureBuilder[], choices: FigureChoices): void;
  /** How the figures are read; `changed` hears of what the reader chooses. */
  read(reading: Reading): void;
  onRead(changed: (reading: Reading) => void): void;
  /** Draws all; one after another, with `breath` between. */
  draw(setting: Setting, breath?: () => Promise<void>): Promise<void>;
}

export interface FigureChoices extends ReadingChoices {
  /** Periodic columns, whose moments can be marked. */
  readonly columns: readonly Column[];
}

export function figureList(first: readonly FigureBuilder[], firstChoices: FigureChoices): FigureList {
  let reading = plainReading;
  let heard: (reading: Reading) => void = () => undefined;
  const bar = readingBar((chosen) => {
    readAs(chosen);
    heard(chosen);
  });
  bar.offer(firstChoices);
  let pinned: number | null = null;
  const moment = momentBar((share) => {
    pinned = share;
    mark(share);
  });
  moment.offer(firstChoices.columns);
  const box = element('div', { class: 'figure-list' });
  const views = new Map<string, FigureView>();
  let order: readonly string[] = [];
  const choosers = new Map<string, Chooser>();
  const stale = new Set<FigureView>();
  const inView = new Set<Element>();
  let setting: Setting | null = null;
  const watch = new IntersectionObserver(
    (entries) => {
      for (const { target, isIntersecting } of entries) {
        if (isIntersecting) inView.add(target);
        else inView.delete(target);
      }
      drawSeen();
    },
    { rootMargin: '120px' },
  );

  function drawSeen(): void {
    if (setting === null) return;
    for (const view of stale) {
      if (!inView.has(view.element)) continue;
      stale.delete(view);
      void view.draw(read(setting));
    }
  }

  function mark(share: number | null): void {
    moment.show(share, reading.unit);
    for (const view of views.values()) view.mark(share);
  }

  /** The pointer's moment while it is over a figure, else that of the slider. */
  function point(share: number | null): void {
    mark(share ?? pinned);
  }

  function read(plain: Setting): Setting {
    return { ...plain, style: { ...plain.style, reading } };
  }

  function readAs(chosen: Reading): void {
    reading = chosen;
    moment.show(pinned, chosen.unit);
    for (const view of views.values()) {
      view.leaveZoom();
      stale.add(view);
    }
    drawSeen();
  }

  function lay(builders: readonly FigureBuilder[]): void {
    order = builders.map(({ id }) => id);
    for (const [id, view] of views) {
      if (builders.some((one) => one.id === id)) continue;
      watch.unobserve(view.element);
      view.element.remove();
      views.delete(id);
      choosers.delete(id);
      stale.delete(view);
      inView.delete(view.element);
    }
    for (const [index, builder] of builders.entries()) {
      const { id } = builder;
      const chooser = chooserOf(builder);
      const build = (style: FigureStyle) => builder.build(style, chooser?.chosen() ?? 0);
      const known = views.get(id);
      const view = known ?? figureView(index + 1, build, chooser?.element ?? null, point);
      if (known) known.renew(index + 1, build);
      else views.set(id, view);
      stale.add(view);
      if (box.children[index] !== view.element) box.insertBefore(view.element, box.children[index] ?? null);
      if (!known) watch.observe(view.element);
    }
  }

  function chooserOf({ id, choice: offered }: FigureBuilder): Chooser | null {
    if (offered === undefined) return null;
    const known = choosers.get(id) ?? chooser(offered.label, () => void views.get(id)?.refresh());
    known.offer(offered.options);
    choosers.set(id, known);
    return known;
  }

  lay(first);
  return {
    element: element('div', { class: 'figures' }, bar.element, moment.element, box),
    views: () => order.map((id) => views.get(id)!),
    show(builders, choices) {
      bar.offer(choices);
      moment.offer(choices.columns);
      lay(builders);
      drawSeen();
    },
    read(chosen) {
      bar.show(chosen);
      readAs(chosen);
    },
    onRead(changed) {
      heard = changed;
    },
    async draw(changed, breath = async () => undefined) {
      setting = changed;
      for (const view of views.values()) {
        stale.delete(view);
        await view.draw(read(changed));
        await breath();
      }
    },
  };
}

interface Chooser {
  readonly element: HTMLElement;
  /** Place of what is chosen. */
  chosen(): number;
  /** One option needs no choice. */
  offer(options: readonly string[]): void;
}

function chooser(label: string, changed: () => void): Chooser {
  const select = element('select', {});
  select.addEventListener('change', changed);
  const row = controlRow('What the figure shows', labelled(label, select));
  return {
    element: row,
    chosen: () => Math.max(0, select.selectedIndex),
    offer(options) {
      const chosen = Math.max(0, select.selectedIndex);
      select.replaceChildren(...options.map((name) => element('option', {}, shortened(name))));
      select.selectedIndex = Math.min(chosen, options.length - 1);
      row.hidden = options.length < 2;
    },
  };
}
