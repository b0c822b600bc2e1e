/** When antennas are open beyond their weekly hours, and what a change of hours, mask or price would do. */
import { Module } from '@nestjs/common';
import { MarketModule } from '../market/market.module.js';
import { StationsModule } from '../stations/stations.module.js';
import { AvailabilityController } from './availability.controller.js';
import { AvailabilityRepository } from './availability.repository.js';
import { AvailabilityService } from './availability.service.js';
import { PreviewService } from './preview.service.js';
import { PriceCardsService } from './price-cards.service.js';

@Module({
  imports: [StationsModule, MarketModule],
  controllers: [AvailabilityController],
  providers: [AvailabilityRepository, AvailabilityService, PreviewService, PriceCardsService],
})
export class AvailabilityModule {}
