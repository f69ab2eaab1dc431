/** Where the page starts: reads the run or trace that it carries, lays out the words at once, draws figures when Plotly is there. */
import { element } from './element.ts';
import type { FigureView } from './figureView.ts';
import { page } from './page.ts';
import { readPage } from './readPage.ts';
import { PageError } from './readResult.ts';
import { screenSetting, watchSurroundings } from './surroundings.ts';
import { tracePage } from './tracePage.ts';

function start(): void {
  const block = document.getElementById('perilag-data');
  try {
    const { trace, result } = readPage(block?.textContent ?? '');
    const { element: main, figures } = trace === null ? page(result) : tracePage(trace);
    const { title, file } = (trace ?? result).scenario;
    document.title = title ?? file;
    document.body.append(main);
    addEventListener('DOMContentLoaded', () => void drawAll(figures));
  } catch (error) {
    if (!(error instanceof PageError)) throw error;
    document.body.append(
      element('main', { class: 'message' }, element('h1', {}, 'No report'), element('p', {}, error.message)),
    );
  }
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
