/** Translates between HTTP and standby. */
import { Controller } from '@nestjs/common';
import { type ResponseOf, routes, type StandbyEntry } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { StandbyService } from './standby.service.js';

@Controller()
export class StandbyController {
  constructor(private readonly standby: StandbyService) {}

  @Handles(routes.listStandby)
  list(@Input() input: HandlerInput<typeof routes.listStandby>): ResponseOf<typeof routes.listStandby> {
    return this.standby.list(input.caller);
  }

  @Handles(routes.joinStandby)
  join(@Input() input: HandlerInput<typeof routes.joinStandby>): Promise<StandbyEntry> {
    return this.standby.join(input.caller, input.body);
  }

  @Handles(routes.leaveStandby)
  leave(@Input() input: HandlerInput<typeof routes.leaveStandby>): StandbyEntry {
    return this.standby.leave(input.caller, input.params.id);
  }
}
