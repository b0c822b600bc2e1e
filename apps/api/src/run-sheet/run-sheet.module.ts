/** What a station does now, next and later, and who is at its dishes. */
import { Module } from '@nestjs/common';
import { BookingFlowModule } from '../bookings/booking-flow.module.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { LiveRecordsModule } from '../live/live-records.module.js';
import { DishService } from './dish.service.js';
import { DishRecordsModule } from './dish-records.module.js';
import { RunSheetController } from './run-sheet.controller.js';
import { RunSheetRepository } from './run-sheet.repository.js';
import { RunSheetService } from './run-sheet.service.js';

@Module({
  imports: [BookingFlowModule, DishRecordsModule, JobsModule, LiveRecordsModule],
  controllers: [RunSheetController],
  providers: [RunSheetRepository, RunSheetService, DishService],
})
export class RunSheetModule {}
