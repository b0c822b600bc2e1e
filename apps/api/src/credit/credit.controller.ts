/** Translates between HTTP and monthly accounts. */
import { Controller } from '@nestjs/common';
import { type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { BillService } from './bills.service.js';
import { CreditService } from './credit.service.js';

@Controller()
export class CreditController {
  constructor(
    private readonly credit: CreditService,
    private readonly bills: BillService,
  ) {}

  @Handles(routes.myCredit)
  mine(@Input() input: HandlerInput<typeof routes.myCredit>): ResponseOf<typeof routes.myCredit> {
    return this.credit.list(input.caller.organisationId);
  }

  @Handles(routes.askCredit)
  ask(@Input() input: HandlerInput<typeof routes.askCredit>): ResponseOf<typeof routes.askCredit> {
    return this.credit.ask(input.caller, input.body);
  }

  @Handles(routes.buyOnAccount)
  buy(@Input() input: HandlerInput<typeof routes.buyOnAccount>): ResponseOf<typeof routes.buyOnAccount> {
    this.credit.buy(input.caller, input.params.id);
    return { ok: true };
  }

  @Handles(routes.payBill)
  pay(@Input() input: HandlerInput<typeof routes.payBill>): Promise<ResponseOf<typeof routes.payBill>> {
    return this.bills.pay(input.caller, input.params.id);
  }

  @Handles(routes.listCredit)
  list(): ResponseOf<typeof routes.listCredit> {
    return this.credit.list();
  }

  @Handles(routes.decideCredit)
  decide(@Input() input: HandlerInput<typeof routes.decideCredit>): ResponseOf<typeof routes.decideCredit> {
    return this.credit.decide(input.caller, input.params.id, input.body);
  }
}
