/** Where the page starts: reads the run that it carries, lays out the words at once, draws figures when Plotly is there. */
import { element } from './element.ts';
import type { FigureView } from './figureView.ts';
import { page } from './page.ts';
import { PageError, readResult } from './readResult.ts';
import { type Setting, screenSetting, watchSurroundings } from './surroundings.ts';

function start(): void {
  const block = document.getElementById('perilag-data');
  try {
    const result = readResult(block?.textContent ?? '');
    const { element: main, figures } = page(result);
    document.title = result.scenario.title ?? result.scenario.file;
    document.body.append(main);
    addEventListener('DOMContentLoaded', () => void drawAll(figures));
  } catch (error) {
    if (!(error instanceof PageError)) throw error;
    document.body.append(
      element('main', { class: 'message' }, element('h1', {}, 'No report'), element('p', {}, error.message)),
    );
  }
}

async function drawAll(figures: readonly FigureView[]): Promise<void> {
  const draw = async (setting: Setting): Promise<void> => {
    await Promise.all(figures.map((figure) => figure.draw(setting)));
  };
  watchSurroundings((setting) => void draw(setting));
  await draw(screenSetting());
  document.body.dataset.drawn = 'yes';
}

start();
