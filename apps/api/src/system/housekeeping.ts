/** Forgets what nobody needs any more. */
import { Injectable, type OnModuleInit } from '@nestjs/common';
import { JobsService } from '../jobs/jobs.service.js';
import { IdempotencyStore } from '../platform/idempotency.store.js';

const EVERY_MS = 3_600_000;

@Injectable()
export class Housekeeping implements OnModuleInit {
  constructor(
    private readonly jobs: JobsService,
    private readonly answers: IdempotencyStore,
  ) {}

  onModuleInit(): void {
    this.jobs.every('forget old answers', EVERY_MS, () => this.answers.forgetOld());
  }
}
