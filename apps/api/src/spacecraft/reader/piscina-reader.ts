/** Reads long texts in a worker thread, which ends when it has been idle for a while. */
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { ElementReading } from '@skyberth/orbit';
import { Piscina } from 'piscina';
import { DomainError } from '../../platform/domain-error.js';
import { type EphemerisReading, readEphemeris } from '../ephemeris-file.js';
import { type ElementReader, type ElementText, readText } from './element-reader.js';
import type { ReadTask } from './read-worker.js';

/** A text so short is read in less time than a thread takes to start. */
const SHORT_TEXT = 20_000;
const IDLE_MS = 30_000;
const MOST_WAITING = 20;

/** The built worker, whether this file runs from `dist` or, under a test runner, from its source. */
function workerFile(): string {
  const here = import.meta.url;
  const built = here.endsWith('.ts')
    ? new URL('../../../dist/spacecraft/reader/read-worker.js', here)
    : new URL('./read-worker.js', here);
  const file = fileURLToPath(built);
  if (!existsSync(file)) {
    throw new Error(
      `The reading worker ${file} is not built. Run npm run build, or set PASS_WORKERS=0 to read in this process.`,
    );
  }
  return file;
}

export class PiscinaReader implements ElementReader {
  private readonly pool = new Piscina({
    filename: workerFile(),
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: IDLE_MS,
    maxQueue: MOST_WAITING,
  });

  async read(input: ElementText): Promise<ElementReading> {
    if (input.text.length <= SHORT_TEXT) return readText(input);
    return this.inThread({ kind: 'elements', input });
  }

  async readEphemeris(text: string): Promise<EphemerisReading> {
    if (text.length <= SHORT_TEXT) return readEphemeris(text);
    return this.inThread({ kind: 'ephemeris', input: { text, fileName: null } });
  }

  private async inThread<Reading>(task: ReadTask): Promise<Reading> {
    if (this.pool.queueSize >= MOST_WAITING) {
      throw new DomainError('unavailable', 'Many large files are being read just now. Try again in a minute.');
    }
    const reading: Reading = await this.pool.run(task);
    return reading;
  }

  async close(): Promise<void> {
    await this.pool.destroy();
  }
}
