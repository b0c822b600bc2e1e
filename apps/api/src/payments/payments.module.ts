/** Payments: paying for holds, the provider's events, and what is ordered from it. */
import { Module } from '@nestjs/common';
import { StripeAdapter } from '../adapters/payment/stripe.adapter.js';
import { BookingFlowModule } from '../bookings/booking-flow.module.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { CheckoutService } from './checkout.service.js';
import { PAYMENT_PORT } from './payment.port.js';
import { PaymentEvents } from './payment-events.service.js';
import { PaymentOutcomes } from './payment-outcomes.js';
import { PaymentRefunds } from './payment-refunds.js';
import { PaymentWorker } from './payment-worker.js';
import { PaymentsController } from './payments.controller.js';

@Module({
  imports: [BookingFlowModule, JobsModule],
  controllers: [PaymentsController],
  providers: [
    { provide: PAYMENT_PORT, useClass: StripeAdapter },
    CheckoutService,
    PaymentEvents,
    PaymentOutcomes,
    PaymentRefunds,
    PaymentWorker,
  ],
})
export class PaymentsModule {}
