import { Controller } from '@nestjs/common';
import { type Member, type Organisation, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { OrganisationService } from './organisation.service.js';

@Controller()
export class OrganisationController {
  constructor(private readonly organisations: OrganisationService) {}

  @Handles(routes.organisation)
  organisation(@Input() input: HandlerInput<typeof routes.organisation>): Organisation {
    return this.organisations.own(input.caller);
  }

  @Handles(routes.updateOrganisation)
  update(@Input() input: HandlerInput<typeof routes.updateOrganisation>): Organisation {
    return this.organisations.update(input.caller, input.body);
  }

  @Handles(routes.members)
  members(@Input() input: HandlerInput<typeof routes.members>): { items: Member[] } {
    return this.organisations.members(input.caller);
  }

  @Handles(routes.inviteMember)
  invite(@Input() input: HandlerInput<typeof routes.inviteMember>): Member {
    return this.organisations.invite(input.caller, input.body);
  }

  @Handles(routes.changeMember)
  change(@Input() input: HandlerInput<typeof routes.changeMember>): Member {
    return this.organisations.changeRole(input.caller, input.params.personId, input.body.role);
  }

  @Handles(routes.removeMember)
  remove(@Input() input: HandlerInput<typeof routes.removeMember>): { ok: true } {
    return this.organisations.remove(input.caller, input.params.personId);
  }
}
