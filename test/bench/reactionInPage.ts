/** What `reaction.ts` runs within a page: each function stands alone, for it is sent there as text. */

/** Milliseconds from the movement. */
export interface Reaction {
  readonly sentence: number;
  readonly figures: number;
  /** In the worker, by its own clock. */
  readonly solved: number;
  /** The answer unpacked on the page's side. */
  readonly arrived: number;
}

interface Heard {
  heard?: { readonly at: number; readonly solved: number };
}

/** Before the page: notes when answers of workers come. */
export function watchWorkers(): void {
  const noted = globalThis as Heard;
  globalThis.Worker = class extends Worker {
    constructor(url: string | URL) {
      super(url);
      this.addEventListener('message', ({ data }) => {
        if (data.kind === 'ran') noted.heard = { at: performance.now(), solved: 1000 * data.seconds };
      });
    }
  };
}

/** Milliseconds since the page was asked for, at the frame that shows the first figure. */
export async function firstFigureTime(): Promise<number> {
  while (document.querySelector('.plot .main-svg :is(.js-line, .hm image)') === null)
    await new Promise((done) => requestAnimationFrame(done));
  return performance.now();
}

/** One after another, each from rest: the slider of `key` goes back and forth. */
export async function reactionTimes({ key, movements }: { key: string; movements: number }): Promise<Reaction[]> {
  const slider = document.getElementById(`dial-${key.replaceAll('.', '-')}`) as HTMLInputElement;
  const inView = [...document.querySelectorAll<HTMLElement>('.plot')].filter((plot) => {
    const { top, bottom } = plot.getBoundingClientRect();
    return bottom > 0 && top < innerHeight;
  });
  // A figure at the edge may leave the view as words above it grow: it is then not drawn, and not waited for.
  const drawnAnew = (plot: HTMLElement): Promise<number> =>
    new Promise((done) => {
      const emitter = plot as unknown as { once(event: string, heard: () => void): void };
      emitter.once('plotly_afterplot', () => done(performance.now()));
      setTimeout(() => done(0), 5000);
    });
  const toldAnew = (): Promise<number> =>
    new Promise((done) => {
      const watch = new MutationObserver(() => {
        watch.disconnect();
        done(performance.now());
      });
      watch.observe(document.querySelector('.answer')!, { childList: true });
    });
  const reactions: Reaction[] = [];
  for (let i = 0; i < movements; i++) {
    await new Promise((done) => setTimeout(done, 400));
    slider.value = String(0.2 + 0.02 * i);
    const began = performance.now();
    const [sentence, ...figures] = [toldAnew(), ...inView.map(drawnAnew)];
    slider.dispatchEvent(new Event('input'));
    const told = (await sentence) - began;
    const drawn = Math.max(...(await Promise.all(figures))) - began;
    const { at, solved } = (globalThis as { heard?: { at: number; solved: number } }).heard!;
    reactions.push({ sentence: told, figures: drawn, solved, arrived: at - began });
  }
  return reactions;
}
