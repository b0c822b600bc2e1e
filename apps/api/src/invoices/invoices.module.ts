/** What is printed about money: invoices and credit notes. */
import { Module } from '@nestjs/common';
import { InvoicePress } from './invoice-press.js';
import { InvoicesController } from './invoices.controller.js';
import { InvoiceRepository } from './invoices.repository.js';
import { InvoiceService } from './invoices.service.js';
import { TaxController } from './tax.controller.js';

@Module({
  controllers: [InvoicesController, TaxController],
  providers: [InvoiceRepository, InvoicePress, InvoiceService],
  exports: [InvoiceService],
})
export class InvoicesModule {}
