import { Controller } from '@nestjs/common';
import { type Antenna, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { AntennasService } from './antennas.service.js';

@Controller()
export class AntennasController {
  constructor(private readonly antennas: AntennasService) {}

  @Handles(routes.createAntenna)
  create(@Input() input: HandlerInput<typeof routes.createAntenna>): Antenna {
    return this.antennas.create(input.caller, input.params.id, input.body);
  }

  @Handles(routes.getAntenna)
  get(@Input() input: HandlerInput<typeof routes.getAntenna>): Antenna {
    return this.antennas.get(input.caller, input.params.id);
  }

  @Handles(routes.updateAntenna)
  update(@Input() input: HandlerInput<typeof routes.updateAntenna>): Antenna {
    return this.antennas.update(input.caller, input.params.id, input.body);
  }

  @Handles(routes.setBands)
  setBands(@Input() input: HandlerInput<typeof routes.setBands>): Antenna {
    return this.antennas.setBands(input.caller, input.params.id, input.body);
  }

  @Handles(routes.setMask)
  setMask(@Input() input: HandlerInput<typeof routes.setMask>): Antenna {
    return this.antennas.setMask(input.caller, input.params.id, input.body);
  }

  @Handles(routes.readMaskCsv)
  readMaskCsv(@Input() input: HandlerInput<typeof routes.readMaskCsv>): ResponseOf<typeof routes.readMaskCsv> {
    return this.antennas.readMaskCsv(input.body.text);
  }

  @Handles(routes.setAvailability)
  setAvailability(@Input() input: HandlerInput<typeof routes.setAvailability>): Antenna {
    return this.antennas.setAvailability(input.caller, input.params.id, input.body);
  }

  @Handles(routes.setPrice)
  setPrice(@Input() input: HandlerInput<typeof routes.setPrice>): Antenna {
    return this.antennas.setPrice(input.caller, input.params.id, input.body);
  }

  @Handles(routes.addBlackout)
  addBlackout(@Input() input: HandlerInput<typeof routes.addBlackout>): ResponseOf<typeof routes.addBlackout> {
    return this.antennas.addBlackout(input.caller, input.params.id, input.body);
  }

  @Handles(routes.removeBlackout)
  removeBlackout(@Input() input: HandlerInput<typeof routes.removeBlackout>): { ok: true } {
    return this.antennas.removeBlackout(input.caller, input.params.id);
  }

  @Handles(routes.putOnSale)
  putOnSale(@Input() input: HandlerInput<typeof routes.putOnSale>): Antenna {
    return this.antennas.putOnSale(input.caller, input.params.id, input.body);
  }
}
