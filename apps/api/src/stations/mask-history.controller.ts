/** Translates between HTTP and the masks that an antenna has had. */
import { Controller } from '@nestjs/common';
import { type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { AntennasService } from './antennas.service.js';
import { MaskHistoryRepository } from './mask-history.repository.js';

@Controller()
export class MaskHistoryController {
  constructor(
    private readonly antennas: AntennasService,
    private readonly history: MaskHistoryRepository,
  ) {}

  /** Whoever may see the antenna may see its masks. */
  @Handles(routes.listMasks)
  list(@Input() input: HandlerInput<typeof routes.listMasks>): ResponseOf<typeof routes.listMasks> {
    const { id } = this.antennas.get(input.caller, input.params.id);
    return { items: this.history.of(id) };
  }
}
