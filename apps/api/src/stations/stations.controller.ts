import { Controller } from '@nestjs/common';
import { type ResponseOf, routes, type Station } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { StationsService } from './stations.service.js';

@Controller()
export class StationsController {
  constructor(private readonly stations: StationsService) {}

  @Handles(routes.listStations)
  list(@Input() input: HandlerInput<typeof routes.listStations>): ResponseOf<typeof routes.listStations> {
    return this.stations.list(input.caller, input.query);
  }

  @Handles(routes.createStation)
  create(@Input() input: HandlerInput<typeof routes.createStation>): Station {
    return this.stations.create(input.caller, input.body);
  }

  @Handles(routes.getStation)
  get(@Input() input: HandlerInput<typeof routes.getStation>): Station {
    return this.stations.get(input.caller, input.params.id);
  }

  @Handles(routes.updateStation)
  update(@Input() input: HandlerInput<typeof routes.updateStation>): Station {
    return this.stations.update(input.caller, input.params.id, input.body);
  }

  @Handles(routes.submitStation)
  submit(@Input() input: HandlerInput<typeof routes.submitStation>): Station {
    return this.stations.submit(input.caller, input.params.id);
  }

  @Handles(routes.decideStation)
  decide(@Input() input: HandlerInput<typeof routes.decideStation>): Station {
    return this.stations.decide(input.caller, input.params.id, input.body);
  }
}
