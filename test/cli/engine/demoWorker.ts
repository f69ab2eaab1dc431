/** A worker thread that knows the jobs of the tests. */
import { serve } from '../../../cli/engine/serve.ts';
import { demoKinds } from './demo.ts';

serve(demoKinds);
