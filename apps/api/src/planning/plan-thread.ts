/** Runs a planning job in a thread of its own, so that the event loop stays free and a stop takes effect at once. */
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { Worker } from 'node:worker_threads';
import type { PlanOutcome, PlanProgress } from '@skyberth/shared';
import type { PlanJob, PlanMessage } from './workers/plan-job.js';

export type ThreadAnswer =
  | { readonly kind: 'done'; readonly outcome: PlanOutcome }
  | { readonly kind: 'refused'; readonly sentence: string }
  | { readonly kind: 'stopped' };

/** Rejects where the thread fails. */
export function runInThread(
  job: PlanJob,
  signal: AbortSignal,
  onProgress: (progress: PlanProgress) => void,
): Promise<ThreadAnswer> {
  return new Promise((resolve, reject) => {
    if (signal.aborted) return resolve({ kind: 'stopped' });
    const worker = new Worker(workerFile(), { workerData: job, execArgv: [] });
    const stop = (): void => {
      resolve({ kind: 'stopped' });
      void worker.terminate();
    };
    signal.addEventListener('abort', stop, { once: true });
    worker.on('message', (message: PlanMessage) => {
      if (message.kind === 'progress') onProgress(message.progress);
      else resolve(message);
    });
    worker.once('error', reject);
    worker.once('exit', (code) => {
      signal.removeEventListener('abort', stop);
      reject(new Error(`The planning thread ended with ${code} and without an answer.`));
    });
  });
}

/** The built worker, whether this file runs from `dist` or, under a test runner, from its source. */
function workerFile(): string {
  const here = import.meta.url;
  const built = here.endsWith('.ts')
    ? new URL('../../dist/planning/workers/plan-worker.js', here)
    : new URL('./workers/plan-worker.js', here);
  const file = fileURLToPath(built);
  if (!existsSync(file)) throw new Error(`The planning worker ${file} is not built. Run npm run build.`);
  return file;
}
