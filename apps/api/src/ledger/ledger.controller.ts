/** Translates between HTTP and the ledger. */
import { Controller } from '@nestjs/common';
import { type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { LedgerService } from './ledger.service.js';

@Controller()
export class LedgerController {
  constructor(private readonly ledger: LedgerService) {}

  @Handles(routes.journal)
  journal(@Input() input: HandlerInput<typeof routes.journal>): ResponseOf<typeof routes.journal> {
    return this.ledger.journal(input.query);
  }

  @Handles(routes.balances)
  balances(): ResponseOf<typeof routes.balances> {
    return this.ledger.balances();
  }
}
