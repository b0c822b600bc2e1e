/** Waiting for taken passes, and offering what frees. */
import { Module } from '@nestjs/common';
import { BookingFlowModule } from '../bookings/booking-flow.module.js';
import { BookingsModule } from '../bookings/bookings.module.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { MarketModule } from '../market/market.module.js';
import { StandbyController } from './standby.controller.js';
import { StandbyService } from './standby.service.js';
import { StandbyOffers } from './standby-offers.js';
import { StandbyRecordsModule } from './standby-records.module.js';

@Module({
  imports: [StandbyRecordsModule, BookingFlowModule, BookingsModule, MarketModule, JobsModule],
  controllers: [StandbyController],
  providers: [StandbyService, StandbyOffers],
})
export class StandbyModule {}
