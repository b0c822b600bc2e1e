/** What is printed about money: invoices and credit notes. */
import { Module } from '@nestjs/common';
import { InvoicesController } from './invoices.controller.js';
import { InvoiceRepository } from './invoices.repository.js';
import { InvoiceService } from './invoices.service.js';

@Module({
  controllers: [InvoicesController],
  providers: [InvoiceRepository, InvoiceService],
  exports: [InvoiceService],
})
export class InvoicesModule {}
