/** Contacts as they happen. */
import { Module } from '@nestjs/common';
import { BookingRecordsModule } from '../bookings/booking-records.module.js';
import { MarketModule } from '../market/market.module.js';
import { DishRecordsModule } from '../run-sheet/dish-records.module.js';
import { LiveController } from './live.controller.js';
import { LiveService } from './live.service.js';
import { LiveHub } from './live-hub.js';
import { LiveRecordsModule } from './live-records.module.js';

@Module({
  imports: [BookingRecordsModule, DishRecordsModule, LiveRecordsModule, MarketModule],
  controllers: [LiveController],
  providers: [LiveHub, LiveService],
})
export class LiveModule {}
