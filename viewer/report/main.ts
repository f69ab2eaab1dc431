/** Where the page starts: reads what it carries, lays out the words at once, draws figures when Plotly is there. */
import type { Origin } from '../../sim/origin.ts';
import { element } from './element.ts';
import { offerFigures } from './exportFigures.ts';
import type { FigureView } from './figureView.ts';
import { gridPage } from './gridPage.ts';
import { type Page, page } from './page.ts';
import { type Carried, readPage } from './readPage.ts';
import { PageError } from './readResult.ts';
import { spreadPage } from './spreadPage.ts';
import { screenSetting, watchSurroundings } from './surroundings.ts';
import { tracePage } from './tracePage.ts';

function start(): void {
  const block = document.getElementById('perilag-data');
  try {
    const { scenario, element: main, figures } = laidOut(readPage(block?.textContent ?? ''));
    const { title, file } = scenario;
    document.title = title ?? file;
    document.body.append(main);
    offerFigures(figures);
    addEventListener('DOMContentLoaded', () => void drawAll(figures));
  } catch (error) {
    if (!(error instanceof PageError)) throw error;
    document.body.append(
      element('main', { class: 'message' }, element('h1', {}, 'No report'), element('p', {}, error.message)),
    );
  }
}

function laidOut(carried: Carried): Page & Pick<Origin, 'scenario'> {
  if ('trace' in carried) return { ...tracePage(carried.trace), scenario: carried.trace.scenario };
  if ('grid' in carried) return { ...gridPage(carried.grid), scenario: carried.grid.scenario };
  if ('spread' in carried) return { ...spreadPage(carried.spread), scenario: carried.spread.scenario };
  return { ...page(carried.result), scenario: carried.result.scenario };
}

/** First one after another, with a breath between, so that the page can be read and moved; then all at once at every change. */
async function drawAll(figures: readonly FigureView[]): Promise<void> {
  let setting = screenSetting();
  watchSurroundings((changed) => {
    setting = changed;
    for (const figure of figures) void figure.draw(changed);
  });
  for (const figure of figures) {
    await figure.draw(setting);
    await breath();
  }
  document.body.dataset.drawn = 'yes';
}

function breath(): Promise<void> {
  return new Promise((done) => setTimeout(done));
}

start();
