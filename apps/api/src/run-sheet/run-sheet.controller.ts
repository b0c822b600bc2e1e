/** Translates between HTTP and the run sheet. */
import { Controller } from '@nestjs/common';
import { type ResponseOf, type RunSheet, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { DishService } from './dish.service.js';
import { RunSheetService } from './run-sheet.service.js';

@Controller()
export class RunSheetController {
  constructor(
    private readonly sheets: RunSheetService,
    private readonly dishes: DishService,
  ) {}

  @Handles(routes.runSheet)
  sheet(@Input() input: HandlerInput<typeof routes.runSheet>): RunSheet {
    return this.sheets.sheet(input.caller, input.query);
  }

  @Handles(routes.enterDish)
  enter(@Input() input: HandlerInput<typeof routes.enterDish>): ResponseOf<typeof routes.enterDish> {
    return this.dishes.enter(input.caller, input.params.id, input.body.name);
  }

  @Handles(routes.leaveDish)
  leave(@Input() input: HandlerInput<typeof routes.leaveDish>): { ok: true } {
    return this.dishes.leave(input.caller, input.params.id);
  }

  @Handles(routes.stopDish)
  stop(@Input() input: HandlerInput<typeof routes.stopDish>): { ok: true } {
    return this.dishes.stop(input.caller, input.params.id, input.body.reason);
  }

  @Handles(routes.releaseDish)
  release(@Input() input: HandlerInput<typeof routes.releaseDish>): { ok: true } {
    return this.dishes.release(input.caller, input.params.id);
  }

  @Handles(routes.writeHandOver)
  handOver(@Input() input: HandlerInput<typeof routes.writeHandOver>): ResponseOf<typeof routes.writeHandOver> {
    return this.sheets.writeHandOver(input.caller, input.params.id, input.body.text);
  }
}
