/**
 * One script for the page and for its workers, which are started from the page's own text: so that the file holds the
 * computation once. Each side reads only its own half.
 */
void (typeof document === 'undefined' ? import('./live/worker.ts') : import('./start.ts'));
