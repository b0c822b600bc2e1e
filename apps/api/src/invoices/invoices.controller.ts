/** Translates between HTTP and invoices. */
import { Controller, Res, StreamableFile } from '@nestjs/common';
import { type ResponseOf, routes } from '@skyberth/shared';
import type { Response } from 'express';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { InvoiceService } from './invoices.service.js';

@Controller()
export class InvoicesController {
  constructor(private readonly invoices: InvoiceService) {}

  @Handles(routes.listInvoices)
  list(@Input() input: HandlerInput<typeof routes.listInvoices>): ResponseOf<typeof routes.listInvoices> {
    return this.invoices.list(input.caller, input.query);
  }

  @Handles(routes.getInvoice)
  one(@Input() input: HandlerInput<typeof routes.getInvoice>): ResponseOf<typeof routes.getInvoice> {
    return this.invoices.one(input.caller, input.params.id);
  }

  @Handles(routes.invoicePdf)
  async pdf(
    @Input() input: HandlerInput<typeof routes.invoicePdf>,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile> {
    const { body, fileName } = await this.invoices.pdf(input.caller, input.params.id);
    response.setHeader('Cache-Control', 'private, no-store');
    return new StreamableFile(body, {
      type: 'application/pdf',
      disposition: `inline; filename="${fileName}"`,
      length: body.byteLength,
    });
  }
}
