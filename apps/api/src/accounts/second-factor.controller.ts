import { Controller } from '@nestjs/common';
import { type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { SecondFactorService } from './second-factor.service.js';

@Controller()
export class SecondFactorController {
  constructor(private readonly factors: SecondFactorService) {}

  @Handles(routes.secondFactor)
  state(@Input() input: HandlerInput<typeof routes.secondFactor>): ResponseOf<typeof routes.secondFactor> {
    return this.factors.state(input.caller);
  }

  @Handles(routes.beginSecondFactor)
  begin(
    @Input() input: HandlerInput<typeof routes.beginSecondFactor>,
  ): Promise<ResponseOf<typeof routes.beginSecondFactor>> {
    return this.factors.begin(input.caller, input.body.password);
  }

  @Handles(routes.confirmSecondFactor)
  confirm(
    @Input() input: HandlerInput<typeof routes.confirmSecondFactor>,
  ): ResponseOf<typeof routes.confirmSecondFactor> {
    return this.factors.confirm(input.caller, input.body.code);
  }
}
