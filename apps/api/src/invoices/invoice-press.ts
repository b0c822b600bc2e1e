/**
 * Prints invoices in a thread of its own, since laying out a page takes tens of milliseconds in which nobody else would be
 * answered. Without threads (`PASS_WORKERS=0`) it prints in this process; the bytes are the same.
 */
import { existsSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { Inject, Injectable, type OnApplicationShutdown } from '@nestjs/common';
import type { Invoice } from '@skyberth/shared';
import { Piscina } from 'piscina';
import { CONFIG, type Config } from '../platform/config.js';
import { DomainError } from '../platform/domain-error.js';
import { invoicePdf } from './invoice-pdf.js';

/** Pages that may wait for the press before new ones are refused. */
const MAX_WAITING = 500;
/** The fonts take memory; a press that nobody needs is put away. */
const IDLE_MS = 120_000;

@Injectable()
export class InvoicePress implements OnApplicationShutdown {
  private pool: Piscina | undefined;

  constructor(@Inject(CONFIG) private readonly config: Config) {}

  /** Throws `unavailable` when too many wait. */
  async print(invoice: Invoice): Promise<Buffer> {
    if (this.config.passWorkers === 0) return invoicePdf(invoice);
    this.pool ??= new Piscina({
      filename: workerFile(),
      minThreads: 0,
      maxThreads: 1,
      idleTimeout: IDLE_MS,
      execArgv: [],
    });
    if (this.pool.queueSize >= MAX_WAITING) {
      throw new DomainError('unavailable', 'Too many documents are being printed. Try again in a minute.');
    }
    const bytes: Uint8Array = await this.pool.run(invoice);
    return Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  }

  async onApplicationShutdown(): Promise<void> {
    await this.pool?.destroy();
  }
}

/** The built worker, whether this file runs from `dist` or, under a test runner, from its source. */
function workerFile(): string {
  const here = import.meta.url;
  const built = here.endsWith('.ts')
    ? new URL('../../dist/invoices/pdf-worker.js', here)
    : new URL('./pdf-worker.js', here);
  const file = fileURLToPath(built);
  if (!existsSync(file)) throw new Error(`The press ${file} is not built. Run npm run build, or set PASS_WORKERS=0.`);
  return file;
}
