/** Buying on a monthly account. */
import { Module } from '@nestjs/common';
import { BookingFlowModule } from '../bookings/booking-flow.module.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { PaymentsModule } from '../payments/payments.module.js';
import { BillService } from './bills.service.js';
import { CreditController } from './credit.controller.js';
import { CreditRepository } from './credit.repository.js';
import { CreditService } from './credit.service.js';
import { CreditNotices } from './credit-notices.js';

@Module({
  imports: [BookingFlowModule, JobsModule, PaymentsModule],
  controllers: [CreditController],
  providers: [CreditRepository, CreditService, CreditNotices, BillService],
})
export class CreditModule {}
