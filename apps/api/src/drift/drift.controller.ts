/** Translates between HTTP and the drift of booked contacts. */
import { Controller } from '@nestjs/common';
import { type Booking, type Drift, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { DriftService } from './drift.service.js';

@Controller()
export class DriftController {
  constructor(private readonly drift: DriftService) {}

  @Handles(routes.bookingDrift)
  of(@Input() input: HandlerInput<typeof routes.bookingDrift>): Drift {
    return this.drift.of(input.caller, input.params.id);
  }

  @Handles(routes.acceptDrift)
  accept(@Input() input: HandlerInput<typeof routes.acceptDrift>): Booking {
    return this.drift.accept(input.caller, input.params.id, input.body.questionId);
  }

  @Handles(routes.refuseDrift)
  refuse(@Input() input: HandlerInput<typeof routes.refuseDrift>): Booking {
    return this.drift.refuse(input.caller, input.params.id, input.body.questionId);
  }
}
