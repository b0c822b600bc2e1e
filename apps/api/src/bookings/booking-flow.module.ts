/** The moves of bookings with all that follows from them; used by people's requests, by payments and by the clock. */
import { Module } from '@nestjs/common';
import { ClearanceRecordsModule } from '../clearances/clearance-records.module.js';
import { InvoicesModule } from '../invoices/invoices.module.js';
import { LedgerModule } from '../ledger/ledger.module.js';
import { PaymentRecordsModule } from '../payments/payment-records.module.js';
import { BookingEnding } from './booking-ending.service.js';
import { BookingMoney } from './booking-money.js';
import { BookingNotices } from './booking-notices.js';
import { BookingRecordsModule } from './booking-records.module.js';
import { BookingSale } from './booking-sale.service.js';
import { PartiesRepository } from './parties.repository.js';

@Module({
  imports: [BookingRecordsModule, ClearanceRecordsModule, PaymentRecordsModule, InvoicesModule, LedgerModule],
  providers: [PartiesRepository, BookingNotices, BookingMoney, BookingSale, BookingEnding],
  exports: [
    BookingRecordsModule,
    ClearanceRecordsModule,
    PaymentRecordsModule,
    InvoicesModule,
    LedgerModule,
    PartiesRepository,
    BookingNotices,
    BookingMoney,
    BookingSale,
    BookingEnding,
  ],
})
export class BookingFlowModule {}
