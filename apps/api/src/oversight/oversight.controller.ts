import { Controller } from '@nestjs/common';
import { type AccountView, type AuditCheck, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { OversightService } from './oversight.service.js';

@Controller()
export class OversightController {
  constructor(private readonly oversight: OversightService) {}

  @Handles(routes.listAccounts)
  accounts(@Input() input: HandlerInput<typeof routes.listAccounts>): ResponseOf<typeof routes.listAccounts> {
    return this.oversight.accounts(input.query);
  }

  @Handles(routes.getAccount)
  account(@Input() input: HandlerInput<typeof routes.getAccount>): AccountView {
    return this.oversight.account(input.params.id);
  }

  @Handles(routes.suspendAccount)
  suspend(@Input() input: HandlerInput<typeof routes.suspendAccount>): { ok: true } {
    return this.oversight.suspend(input.caller, input.params.id, input.body.reason);
  }

  @Handles(routes.reinstateAccount)
  reinstate(@Input() input: HandlerInput<typeof routes.reinstateAccount>): { ok: true } {
    return this.oversight.reinstate(input.caller, input.params.id, input.body.reason);
  }

  @Handles(routes.listAudit)
  audit(@Input() input: HandlerInput<typeof routes.listAudit>): ResponseOf<typeof routes.listAudit> {
    return this.oversight.auditRows(input.query);
  }

  @Handles(routes.checkAudit)
  check(): Promise<AuditCheck> {
    return this.oversight.checkAudit();
  }
}
