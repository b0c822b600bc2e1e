/** Booked contacts and newer elements. */
import { Module } from '@nestjs/common';
import { BookingFlowModule } from '../bookings/booking-flow.module.js';
import { BookingViews } from '../bookings/booking-views.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { MarketModule } from '../market/market.module.js';
import { SpacecraftModule } from '../spacecraft/spacecraft.module.js';
import { DriftController } from './drift.controller.js';
import { DriftRepository } from './drift.repository.js';
import { DriftService } from './drift.service.js';
import { DriftGeometry } from './drift-geometry.js';
import { DriftWatch } from './drift-watch.js';
import { RetimingService } from './retiming.js';

@Module({
  imports: [BookingFlowModule, JobsModule, MarketModule, SpacecraftModule],
  controllers: [DriftController],
  providers: [BookingViews, DriftRepository, DriftGeometry, DriftWatch, DriftService, RetimingService],
})
export class DriftModule {}
