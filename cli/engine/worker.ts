/** A worker thread of the program. The build makes it dist/worker.cjs; from source, workerFromSource.mjs starts it. */
import { kinds } from './kinds.ts';
import { serve } from './serve.ts';

serve(kinds);
