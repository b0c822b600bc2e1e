/** Planning a fleet's contacts over the market. */
import { Module } from '@nestjs/common';
import { BookingsModule } from '../bookings/bookings.module.js';
import { MarketModule } from '../market/market.module.js';
import { PlanGatherer } from './plan-gatherer.js';
import { PlanningController } from './planning.controller.js';
import { PlanningRepository } from './planning.repository.js';
import { PlanningService } from './planning.service.js';

@Module({
  imports: [BookingsModule, MarketModule],
  controllers: [PlanningController],
  providers: [PlanningRepository, PlanGatherer, PlanningService],
})
export class PlanningModule {}
