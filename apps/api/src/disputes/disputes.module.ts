/** Disputes over how a contact went, decided on evidence that the system assembles. */
import { Module, type OnModuleInit } from '@nestjs/common';
import { BookingFlowModule } from '../bookings/booking-flow.module.js';
import { DriftGeometry } from '../drift/drift-geometry.js';
import { FilesModule } from '../files/files.module.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { JobsService } from '../jobs/jobs.service.js';
import { MarketModule } from '../market/market.module.js';
import { SpacecraftModule } from '../spacecraft/spacecraft.module.js';
import { DisputeMoney } from './dispute-money.js';
import { DisputeNotices } from './dispute-notices.js';
import { DisputeViews } from './dispute-views.js';
import { DisputesController } from './disputes.controller.js';
import { DisputeRepository } from './disputes.repository.js';
import { DisputesService } from './disputes.service.js';
import { EvidenceService } from './evidence.service.js';

const CLOSE_EVERY_MS = 600_000;

@Module({
  imports: [BookingFlowModule, FilesModule, MarketModule, SpacecraftModule, JobsModule],
  controllers: [DisputesController],
  providers: [
    DisputeRepository,
    DisputeMoney,
    DisputeNotices,
    DisputeViews,
    DisputesService,
    DriftGeometry,
    EvidenceService,
  ],
})
export class DisputesModule implements OnModuleInit {
  constructor(
    private readonly jobs: JobsService,
    private readonly disputes: DisputesService,
  ) {}

  onModuleInit(): void {
    this.jobs.every('disputes', CLOSE_EVERY_MS, () => this.disputes.closeBeyondAppeal());
  }
}
