/** Translates between HTTP and payments. */
import { Controller, Headers, Req } from '@nestjs/common';
import { type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input, type SkyberthRequest } from '../platform/contract.js';
import { CheckoutService } from './checkout.service.js';
import { GroupCheckoutService } from './group-checkout.service.js';
import { PaymentEvents } from './payment-events.service.js';

@Controller()
export class PaymentsController {
  constructor(
    private readonly checkouts: CheckoutService,
    private readonly groupCheckouts: GroupCheckoutService,
    private readonly events: PaymentEvents,
  ) {}

  @Handles(routes.checkout)
  checkout(@Input() input: HandlerInput<typeof routes.checkout>): Promise<ResponseOf<typeof routes.checkout>> {
    return this.checkouts.pay(input.caller, input.params.id, input.body);
  }

  @Handles(routes.checkoutGroup)
  checkoutGroup(
    @Input() input: HandlerInput<typeof routes.checkoutGroup>,
  ): Promise<ResponseOf<typeof routes.checkoutGroup>> {
    return this.groupCheckouts.pay(input.caller, input.params.id, input.body);
  }

  @Handles(routes.savedCards)
  cards(@Input() input: HandlerInput<typeof routes.savedCards>): Promise<ResponseOf<typeof routes.savedCards>> {
    return this.checkouts.savedCards(input.caller);
  }

  /** Signed over the bytes, hence the raw body. */
  @Handles(routes.paymentWebhook)
  event(
    @Req() request: SkyberthRequest,
    @Headers('stripe-signature') signature: string | undefined,
  ): ResponseOf<typeof routes.paymentWebhook> {
    this.events.receive(request.rawBody, signature);
    return { ok: true };
  }
}
