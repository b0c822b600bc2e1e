/** Bookings as people and the clock move them. */
import { Module } from '@nestjs/common';
import { JobsModule } from '../jobs/jobs.module.js';
import { MarketModule } from '../market/market.module.js';
import { DishRecordsModule } from '../run-sheet/dish-records.module.js';
import { StandbyRecordsModule } from '../standby/standby-records.module.js';
import { BookingClock } from './booking-clock.js';
import { BookingFlowModule } from './booking-flow.module.js';
import { BookingGeometry } from './booking-geometry.js';
import { BookingGroupsController } from './booking-groups.controller.js';
import { BookingGroupsService } from './booking-groups.service.js';
import { BookingListRepository } from './booking-list.repository.js';
import { BookingViews } from './booking-views.js';
import { BookingsController } from './bookings.controller.js';
import { BookingsService } from './bookings.service.js';
import { HoldService } from './hold.service.js';

@Module({
  imports: [BookingFlowModule, StandbyRecordsModule, DishRecordsModule, MarketModule, JobsModule],
  controllers: [BookingsController, BookingGroupsController],
  providers: [
    BookingListRepository,
    BookingViews,
    BookingGeometry,
    BookingsService,
    HoldService,
    BookingGroupsService,
    BookingClock,
  ],
  exports: [HoldService, BookingGroupsService],
})
export class BookingsModule {}
