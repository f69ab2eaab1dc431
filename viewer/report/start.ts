/** Where the page starts: reads what it carries, lays out the words at once, draws figures when Plotly is there. */
import type { Origin } from '../../sim/origin.ts';
import { element } from './element.ts';
import { offerFigures } from './exportFigures.ts';
import type { FigureView } from './figureView.ts';
import { gridPage } from './gridPage.ts';
import { live } from './live/live.ts';
import { type Page, page } from './page.ts';
import { type Carried, readPage } from './readPage.ts';
import { PageError } from './readResult.ts';
import { spreadPage } from './spreadPage.ts';
import { type Setting, screenSetting, watchSurroundings } from './surroundings.ts';
import { tracePage } from './tracePage.ts';

interface LaidOut {
  readonly element: HTMLElement;
  readonly scenario: Origin['scenario'];
  /** Those that are there now, in their order on the page. */
  figures(): readonly FigureView[];
  draw(setting: Setting, breath?: () => Promise<void>): Promise<void>;
  /** Once all is drawn. */
  started?(): void;
}

function start(): void {
  const block = document.getElementById('perilag-data');
  try {
    const { scenario, element: main, figures, draw, started } = laidOut(readPage(block?.textContent ?? ''));
    const { title, file } = scenario;
    document.title = title ?? file;
    document.body.append(main);
    offerFigures(figures);
    const begin = () => void drawAll(draw).then(started);
    if (document.readyState === 'loading') addEventListener('DOMContentLoaded', begin);
    else begin();
  } catch (error) {
    if (!(error instanceof PageError)) throw error;
    document.body.append(
      element('main', { class: 'message' }, element('h1', {}, 'No report'), element('p', {}, error.message)),
    );
  }
}

function laidOut(carried: Carried): LaidOut {
  if ('trace' in carried) return fixed(tracePage(carried.trace), carried.trace);
  if ('grid' in carried) return fixed(gridPage(carried.grid), carried.grid);
  if ('spread' in carried) return fixed(spreadPage(carried.spread), carried.spread);
  const { result, tree } = carried;
  const made = page(result);
  const { scenario } = result;
  if (tree === null) return { element: made.element, scenario, figures: made.figures.views, draw: made.figures.draw };
  const { element: whole, begin } = live(made, result, tree);
  return { element: whole, scenario, figures: made.figures.views, draw: made.figures.draw, started: begin };
}

/** A page whose figures are there from the start. */
function fixed({ element: whole, figures }: Page, { scenario }: Pick<Origin, 'scenario'>): LaidOut {
  return {
    element: whole,
    scenario,
    figures: () => figures,
    async draw(setting, breath = async () => undefined) {
      for (const figure of figures) {
        await figure.draw(setting);
        await breath();
      }
    },
  };
}

/** First one after another, with a breath between, so that the page can be read and moved; then all at once at every change. */
async function drawAll(draw: LaidOut['draw']): Promise<void> {
  let setting = screenSetting();
  watchSurroundings((changed) => {
    setting = changed;
    void draw(changed);
  });
  await draw(setting, breath);
  document.body.dataset.drawn = 'yes';
}

function breath(): Promise<void> {
  return new Promise((done) => setTimeout(done));
}

start();
