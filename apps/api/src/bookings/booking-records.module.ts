/** The booking rows and the one function that moves them; apart from the use cases, because the market reads them too. */
import { Module } from '@nestjs/common';
import { BookingTransitions } from './booking-transitions.js';
import { BookingRepository } from './bookings.repository.js';

@Module({ providers: [BookingRepository, BookingTransitions], exports: [BookingRepository, BookingTransitions] })
export class BookingRecordsModule {}
