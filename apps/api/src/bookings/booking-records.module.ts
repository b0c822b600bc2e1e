/** The booking rows and the one function that moves them; apart from the use cases, because the market reads them too. */
import { Module } from '@nestjs/common';
import { BookingGroupRepository } from './booking-groups.repository.js';
import { BookingTransitions } from './booking-transitions.js';
import { BookingRepository } from './bookings.repository.js';

const RECORDS = [BookingRepository, BookingGroupRepository, BookingTransitions];

@Module({ providers: RECORDS, exports: RECORDS })
export class BookingRecordsModule {}
