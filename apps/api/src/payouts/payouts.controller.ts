/** Translates between HTTP and payouts. */
import { Controller } from '@nestjs/common';
import { type PayoutRun, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { EarningsService } from './earnings.service.js';
import { PayoutService } from './payouts.service.js';

@Controller()
export class PayoutsController {
  constructor(
    private readonly payouts: PayoutService,
    private readonly ofOwner: EarningsService,
  ) {}

  @Handles(routes.listPayoutRuns)
  list(@Input() input: HandlerInput<typeof routes.listPayoutRuns>): ResponseOf<typeof routes.listPayoutRuns> {
    return this.payouts.list(input.query);
  }

  @Handles(routes.getPayoutRun)
  one(@Input() input: HandlerInput<typeof routes.getPayoutRun>): PayoutRun {
    return this.payouts.one(input.caller, input.params.id);
  }

  @Handles(routes.preparePayoutRun)
  prepare(@Input() input: HandlerInput<typeof routes.preparePayoutRun>): PayoutRun {
    return this.payouts.prepare(input.caller, input.body);
  }

  @Handles(routes.holdPayoutLine)
  hold(@Input() input: HandlerInput<typeof routes.holdPayoutLine>): PayoutRun {
    return this.payouts.hold(input.caller, input.params, input.body.reason);
  }

  @Handles(routes.adjustPayoutLine)
  adjust(@Input() input: HandlerInput<typeof routes.adjustPayoutLine>): PayoutRun {
    return this.payouts.adjust(input.caller, input.params, input.body);
  }

  @Handles(routes.reviewPayoutRun)
  review(@Input() input: HandlerInput<typeof routes.reviewPayoutRun>): PayoutRun {
    return this.payouts.review(input.caller, input.params.id, input.body.code);
  }

  @Handles(routes.approvePayoutRun)
  approve(@Input() input: HandlerInput<typeof routes.approvePayoutRun>): PayoutRun {
    return this.payouts.approve(input.caller, input.params.id, input.body);
  }

  @Handles(routes.dropPayoutRun)
  drop(@Input() input: HandlerInput<typeof routes.dropPayoutRun>): PayoutRun {
    return this.payouts.drop(input.caller, input.params.id);
  }

  @Handles(routes.earnings)
  earnings(@Input() input: HandlerInput<typeof routes.earnings>): ResponseOf<typeof routes.earnings> {
    return this.ofOwner.view(input.caller);
  }

  @Handles(routes.givePayoutAccount)
  giveAccount(@Input() input: HandlerInput<typeof routes.givePayoutAccount>): Promise<{ url: string }> {
    return this.ofOwner.giveAccount(input.caller);
  }
}
