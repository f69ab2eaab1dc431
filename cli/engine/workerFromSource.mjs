// Starts a worker thread from source: Node itself cannot read worker.ts.
import { register } from 'tsx/esm/api';

register();
await import('./worker.ts');
