/** Translates between HTTP and ephemerides. */
import { Controller } from '@nestjs/common';
import { type EphemerisSummary, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { EphemeridesService } from './ephemerides.service.js';

@Controller()
export class EphemeridesController {
  constructor(private readonly ephemerides: EphemeridesService) {}

  @Handles(routes.listEphemerides)
  list(@Input() input: HandlerInput<typeof routes.listEphemerides>): ResponseOf<typeof routes.listEphemerides> {
    return this.ephemerides.list(input.caller, input.params.id);
  }

  @Handles(routes.addEphemeris)
  add(@Input() input: HandlerInput<typeof routes.addEphemeris>): Promise<EphemerisSummary> {
    return this.ephemerides.add(input.caller, input.params.id, input.body);
  }

  @Handles(routes.withdrawEphemeris)
  withdraw(@Input() input: HandlerInput<typeof routes.withdrawEphemeris>): EphemerisSummary {
    return this.ephemerides.withdraw(input.caller, input.params.id, input.params.ephemerisId);
  }
}
