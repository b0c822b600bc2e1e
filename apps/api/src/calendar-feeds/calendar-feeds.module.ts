/** Contacts in people's own calendars. */
import { Module } from '@nestjs/common';
import { CalendarFeedsController } from './calendar-feeds.controller.js';
import { CalendarFeedsRepository } from './calendar-feeds.repository.js';
import { CalendarFeedsService } from './calendar-feeds.service.js';

@Module({ controllers: [CalendarFeedsController], providers: [CalendarFeedsRepository, CalendarFeedsService] })
export class CalendarFeedsModule {}
