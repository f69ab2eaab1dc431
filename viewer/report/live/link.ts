/** The state of the page in its address: written when it has come to rest, read when a reader follows a link. */

export interface Link {
  /** The state has changed. */
  changed(): void;
  /** Takes what the address says now, and from now on whenever it changes. */
  follow(): void;
}

const rest = 200;

/** `current` gives what the address should say behind its `#`, `take` is told what it says instead. */
export function stateLink(current: () => string, take: (hash: string) => void): Link {
  let timer = 0;
  const said = () => location.hash.replace(/^#/, '');
  const read = () => {
    if (said() !== current()) take(said());
  };
  return {
    changed() {
      clearTimeout(timer);
      timer = setTimeout(() => {
        const hash = current();
        if (hash !== said()) history.replaceState(null, '', hash === '' ? location.pathname : `#${hash}`);
      }, rest) as unknown as number;
    },
    follow() {
      read();
      addEventListener('hashchange', read);
    },
  };
}
