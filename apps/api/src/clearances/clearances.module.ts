/** Leave to transmit: asked for by operators, granted by owners, checked by staff. */
import { Module } from '@nestjs/common';
import { BookingFlowModule } from '../bookings/booking-flow.module.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { ClearanceClock } from './clearance-clock.js';
import { ClearanceNotices } from './clearance-notices.js';
import { ClearanceRecordsModule } from './clearance-records.module.js';
import { ClearanceTransitions } from './clearance-transitions.js';
import { ClearanceViews } from './clearance-views.js';
import { ClearancesController } from './clearances.controller.js';
import { ClearancesRepository } from './clearances.repository.js';
import { ClearancesService } from './clearances.service.js';

@Module({
  imports: [ClearanceRecordsModule, BookingFlowModule, JobsModule],
  controllers: [ClearancesController],
  providers: [
    ClearancesRepository,
    ClearanceNotices,
    ClearanceTransitions,
    ClearanceViews,
    ClearancesService,
    ClearanceClock,
  ],
})
export class ClearancesModule {}
