import { Controller } from '@nestjs/common';
import { type DecisionEffect, type Dispute, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { DisputesService } from './disputes.service.js';

@Controller()
export class DisputesController {
  constructor(private readonly disputes: DisputesService) {}

  @Handles(routes.listDisputes)
  list(@Input() input: HandlerInput<typeof routes.listDisputes>): ResponseOf<typeof routes.listDisputes> {
    return this.disputes.list(input.caller, input.query);
  }

  @Handles(routes.getDispute)
  get(@Input() input: HandlerInput<typeof routes.getDispute>): Dispute {
    return this.disputes.get(input.caller, input.params.id);
  }

  @Handles(routes.openDispute)
  open(@Input() input: HandlerInput<typeof routes.openDispute>): Promise<Dispute> {
    return this.disputes.open(input.caller, input.params.id, input.body);
  }

  @Handles(routes.stateInDispute)
  state(@Input() input: HandlerInput<typeof routes.stateInDispute>): Dispute {
    return this.disputes.state(input.caller, input.params.id, input.body);
  }

  @Handles(routes.askInDispute)
  ask(@Input() input: HandlerInput<typeof routes.askInDispute>): Dispute {
    return this.disputes.ask(input.caller, input.params.id, input.body);
  }

  @Handles(routes.assembleEvidence)
  assemble(@Input() input: HandlerInput<typeof routes.assembleEvidence>): Promise<Dispute> {
    return this.disputes.assemble(input.caller, input.params.id);
  }

  @Handles(routes.previewDecision)
  preview(@Input() input: HandlerInput<typeof routes.previewDecision>): DecisionEffect {
    return this.disputes.preview(input.caller, input.params.id, input.body);
  }

  @Handles(routes.decideDispute)
  decide(@Input() input: HandlerInput<typeof routes.decideDispute>): Dispute {
    return this.disputes.decide(input.caller, input.params.id, input.body);
  }

  @Handles(routes.appealDecision)
  appeal(@Input() input: HandlerInput<typeof routes.appealDecision>): Dispute {
    return this.disputes.appeal(input.caller, input.params.id, input.body);
  }

  @Handles(routes.precedents)
  precedents(@Input() input: HandlerInput<typeof routes.precedents>): ResponseOf<typeof routes.precedents> {
    return this.disputes.precedents(input.query);
  }
}
