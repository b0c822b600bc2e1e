/** Translates between HTTP and planning. */
import { Controller } from '@nestjs/common';
import { type Plan, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { PlanningService } from './planning.service.js';

@Controller()
export class PlanningController {
  constructor(private readonly planning: PlanningService) {}

  @Handles(routes.listPlans)
  list(@Input() input: HandlerInput<typeof routes.listPlans>): ResponseOf<typeof routes.listPlans> {
    return this.planning.list(input.caller, input.query);
  }

  @Handles(routes.createPlan)
  create(@Input() input: HandlerInput<typeof routes.createPlan>): Plan {
    return this.planning.create(input.caller, input.body);
  }

  @Handles(routes.getPlan)
  one(@Input() input: HandlerInput<typeof routes.getPlan>): Plan {
    return this.planning.one(input.caller, input.params.id);
  }

  @Handles(routes.replan)
  replan(@Input() input: HandlerInput<typeof routes.replan>): Plan {
    return this.planning.replan(input.caller, input.params.id, input.body);
  }

  @Handles(routes.stopPlan)
  stop(@Input() input: HandlerInput<typeof routes.stopPlan>): Plan {
    return this.planning.stop(input.caller, input.params.id);
  }

  @Handles(routes.holdPlan)
  hold(@Input() input: HandlerInput<typeof routes.holdPlan>): Promise<Plan> {
    return this.planning.hold(input.caller, input.params.id, input.body.oldElementsAcknowledged);
  }

  @Handles(routes.giveUpPlan)
  giveUp(@Input() input: HandlerInput<typeof routes.giveUpPlan>): Plan {
    return this.planning.giveUp(input.caller, input.params.id);
  }
}
