import { Controller } from '@nestjs/common';
import { type ResponseOf, routes, type Spacecraft } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { ElementsService } from './elements.service.js';
import { SpacecraftService } from './spacecraft.service.js';

@Controller()
export class SpacecraftController {
  constructor(
    private readonly spacecraft: SpacecraftService,
    private readonly elements: ElementsService,
  ) {}

  @Handles(routes.listSpacecraft)
  list(@Input() input: HandlerInput<typeof routes.listSpacecraft>): ResponseOf<typeof routes.listSpacecraft> {
    return this.spacecraft.list(input.caller, input.query);
  }

  @Handles(routes.createSpacecraft)
  create(@Input() input: HandlerInput<typeof routes.createSpacecraft>): Spacecraft {
    return this.spacecraft.create(input.caller, input.body);
  }

  @Handles(routes.getSpacecraft)
  get(@Input() input: HandlerInput<typeof routes.getSpacecraft>): Spacecraft {
    return this.spacecraft.get(input.caller, input.params.id);
  }

  @Handles(routes.updateSpacecraft)
  update(@Input() input: HandlerInput<typeof routes.updateSpacecraft>): Spacecraft {
    return this.spacecraft.update(input.caller, input.params.id, input.body);
  }

  @Handles(routes.retireSpacecraft)
  retire(@Input() input: HandlerInput<typeof routes.retireSpacecraft>): Spacecraft {
    return this.spacecraft.retire(input.caller, input.params.id);
  }

  @Handles(routes.listElements)
  history(@Input() input: HandlerInput<typeof routes.listElements>): ResponseOf<typeof routes.listElements> {
    return this.spacecraft.history(input.caller, input.params.id, input.query);
  }

  @Handles(routes.readElements)
  read(@Input() input: HandlerInput<typeof routes.readElements>): Promise<ResponseOf<typeof routes.readElements>> {
    return this.elements.read(input.caller, input.body);
  }

  @Handles(routes.saveElements)
  save(@Input() input: HandlerInput<typeof routes.saveElements>): Promise<ResponseOf<typeof routes.saveElements>> {
    return this.elements.save(input.caller, input.body);
  }
}
