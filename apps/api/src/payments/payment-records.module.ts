/** Payment rows and what is ordered from the provider; apart from the provider itself, because bookings order too. */
import { Module } from '@nestjs/common';
import { PaymentOrders } from './payment-orders.js';
import { PaymentRepository } from './payments.repository.js';

@Module({ providers: [PaymentRepository, PaymentOrders], exports: [PaymentRepository, PaymentOrders] })
export class PaymentRecordsModule {}
