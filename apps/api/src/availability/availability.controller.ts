import { Controller } from '@nestjs/common';
import { type AntennaCalendar, type CalendarRule, type ChangePreview, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { AvailabilityService } from './availability.service.js';
import { readCalendarFile } from './calendar-file.js';
import { PreviewService } from './preview.service.js';
import { PriceCardsService } from './price-cards.service.js';

@Controller()
export class AvailabilityController {
  constructor(
    private readonly availability: AvailabilityService,
    private readonly previews: PreviewService,
    private readonly prices: PriceCardsService,
  ) {}

  @Handles(routes.antennaCalendar)
  calendar(@Input() input: HandlerInput<typeof routes.antennaCalendar>): AntennaCalendar {
    return this.availability.calendar(input.caller, input.params.id, input.query);
  }

  @Handles(routes.addOpening)
  addOpening(@Input() input: HandlerInput<typeof routes.addOpening>): CalendarRule {
    return this.availability.addOpening(input.caller, input.params.id, input.body);
  }

  @Handles(routes.addBlackouts)
  addBlackouts(@Input() input: HandlerInput<typeof routes.addBlackouts>): ResponseOf<typeof routes.addBlackouts> {
    return this.availability.addBlackouts(input.caller, input.body);
  }

  @Handles(routes.removeCalendarEntries)
  remove(@Input() input: HandlerInput<typeof routes.removeCalendarEntries>): { ok: true } {
    return this.availability.remove(input.caller, input.body.ids);
  }

  @Handles(routes.readCalendarFile)
  readFile(@Input() input: HandlerInput<typeof routes.readCalendarFile>): ResponseOf<typeof routes.readCalendarFile> {
    return readCalendarFile(input.body.text, input.body);
  }

  @Handles(routes.previewAntennaChange)
  preview(@Input() input: HandlerInput<typeof routes.previewAntennaChange>): Promise<ChangePreview> {
    return this.previews.preview(input.caller, input.params.id, input.body);
  }

  @Handles(routes.priceExample)
  example(@Input() input: HandlerInput<typeof routes.priceExample>): ResponseOf<typeof routes.priceExample> {
    return this.prices.example(input.caller, input.params.id, input.body);
  }

  @Handles(routes.listPriceCards)
  priceCards(@Input() input: HandlerInput<typeof routes.listPriceCards>): ResponseOf<typeof routes.listPriceCards> {
    return this.prices.list(input.caller, input.params.id);
  }
}
