/** Translates between HTTP and groups of bookings. */
import { Controller } from '@nestjs/common';
import { type BookingGroup, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { BookingGroupsService } from './booking-groups.service.js';

@Controller()
export class BookingGroupsController {
  constructor(private readonly groups: BookingGroupsService) {}

  @Handles(routes.holdGroup)
  hold(@Input() input: HandlerInput<typeof routes.holdGroup>): Promise<BookingGroup> {
    return this.groups.hold(input.caller, input.body.items);
  }

  @Handles(routes.getGroup)
  get(@Input() input: HandlerInput<typeof routes.getGroup>): BookingGroup {
    return this.groups.get(input.caller, input.params.id);
  }

  @Handles(routes.letGroupGo)
  letGo(@Input() input: HandlerInput<typeof routes.letGroupGo>): BookingGroup {
    return this.groups.letGo(input.caller, input.params.id);
  }
}
