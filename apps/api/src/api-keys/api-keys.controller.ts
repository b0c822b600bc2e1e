import { Controller } from '@nestjs/common';
import { type ApiKey, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { ApiKeysService } from './api-keys.service.js';

@Controller()
export class ApiKeysController {
  constructor(private readonly keys: ApiKeysService) {}

  @Handles(routes.listApiKeys)
  list(@Input() input: HandlerInput<typeof routes.listApiKeys>): { items: ApiKey[] } {
    return this.keys.list(input.caller);
  }

  @Handles(routes.makeApiKey)
  make(@Input() input: HandlerInput<typeof routes.makeApiKey>): ResponseOf<typeof routes.makeApiKey> {
    return this.keys.make(input.caller, input.body);
  }

  @Handles(routes.revokeApiKey)
  revoke(@Input() input: HandlerInput<typeof routes.revokeApiKey>): { ok: true } {
    return this.keys.revoke(input.caller, input.params.id);
  }
}
