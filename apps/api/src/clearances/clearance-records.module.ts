/** The rows alone; apart from the use cases, because the market and the bookings read them. */
import { Module } from '@nestjs/common';
import { ClearanceBook } from './clearance-book.js';

@Module({ providers: [ClearanceBook], exports: [ClearanceBook] })
export class ClearanceRecordsModule {}
