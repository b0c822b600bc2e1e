/** Payments: paying for holds, the provider's events, and what is ordered from it. */
import { Module } from '@nestjs/common';
import { StripeAdapter } from '../adapters/payment/stripe.adapter.js';
import { StripeBooks } from '../adapters/payment/stripe-books.adapter.js';
import { BookingFlowModule } from '../bookings/booking-flow.module.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { ChargebackRepository } from './chargebacks.repository.js';
import { CheckoutService } from './checkout.service.js';
import { GroupCheckoutService } from './group-checkout.service.js';
import { PAYMENT_PORT } from './payment.port.js';
import { PaymentChargebacks } from './payment-chargebacks.js';
import { PaymentEvents } from './payment-events.service.js';
import { PaymentOutcomes } from './payment-outcomes.js';
import { PaymentRefunds } from './payment-refunds.js';
import { PaymentWorker } from './payment-worker.js';
import { PaymentsController } from './payments.controller.js';
import { PROVIDER_BOOKS } from './provider-books.port.js';
import { ReadingRepository } from './reading.repository.js';
import { SaleShares } from './sale-shares.js';

@Module({
  imports: [BookingFlowModule, JobsModule],
  controllers: [PaymentsController],
  providers: [
    { provide: PAYMENT_PORT, useClass: StripeAdapter },
    { provide: PROVIDER_BOOKS, useClass: StripeBooks },
    ChargebackRepository,
    CheckoutService,
    GroupCheckoutService,
    PaymentChargebacks,
    PaymentEvents,
    PaymentOutcomes,
    PaymentRefunds,
    PaymentWorker,
    ReadingRepository,
    SaleShares,
  ],
  exports: [
    PAYMENT_PORT,
    PROVIDER_BOOKS,
    ChargebackRepository,
    PaymentChargebacks,
    PaymentOutcomes,
    PaymentRefunds,
    ReadingRepository,
  ],
})
export class PaymentsModule {}
