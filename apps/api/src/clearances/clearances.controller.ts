/** Translates between HTTP and clearances. */
import { Controller } from '@nestjs/common';
import { type Clearance, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { ClearancesService } from './clearances.service.js';

@Controller()
export class ClearancesController {
  constructor(private readonly clearances: ClearancesService) {}

  @Handles(routes.listClearances)
  list(@Input() input: HandlerInput<typeof routes.listClearances>): ResponseOf<typeof routes.listClearances> {
    return this.clearances.list(input.caller, input.query);
  }

  @Handles(routes.getClearance)
  get(@Input() input: HandlerInput<typeof routes.getClearance>): Clearance {
    return this.clearances.get(input.caller, input.params.id);
  }

  @Handles(routes.clearanceChoices)
  choices(): ResponseOf<typeof routes.clearanceChoices> {
    return this.clearances.choices();
  }

  @Handles(routes.requestClearance)
  request(@Input() input: HandlerInput<typeof routes.requestClearance>): Clearance {
    return this.clearances.request(input.caller, input.body);
  }

  @Handles(routes.answerClearance)
  answer(@Input() input: HandlerInput<typeof routes.answerClearance>): Clearance {
    return this.clearances.answer(input.caller, input.params.id, input.body);
  }

  @Handles(routes.checkClearance)
  check(@Input() input: HandlerInput<typeof routes.checkClearance>): Clearance {
    return this.clearances.check(input.caller, input.params.id, input.body);
  }

  @Handles(routes.withdrawClearance)
  withdraw(@Input() input: HandlerInput<typeof routes.withdrawClearance>): Clearance {
    return this.clearances.withdraw(input.caller, input.params.id, input.body.reason);
  }
}
