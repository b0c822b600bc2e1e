/** Translates between HTTP and calendar addresses. */
import { Controller, Req, Res, StreamableFile } from '@nestjs/common';
import { type ResponseOf, routes } from '@skyberth/shared';
import type { Request, Response } from 'express';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { CalendarFeedsService } from './calendar-feeds.service.js';

@Controller()
export class CalendarFeedsController {
  constructor(private readonly feeds: CalendarFeedsService) {}

  @Handles(routes.listCalendarFeeds)
  list(@Input() input: HandlerInput<typeof routes.listCalendarFeeds>): ResponseOf<typeof routes.listCalendarFeeds> {
    return this.feeds.list(input.caller);
  }

  @Handles(routes.makeCalendarFeed)
  make(@Input() input: HandlerInput<typeof routes.makeCalendarFeed>): ResponseOf<typeof routes.makeCalendarFeed> {
    return this.feeds.make(input.caller, input.body);
  }

  @Handles(routes.revokeCalendarFeed)
  revoke(@Input() input: HandlerInput<typeof routes.revokeCalendarFeed>): { ok: true } {
    return this.feeds.revoke(input.caller, input.params.id);
  }

  @Handles(routes.readCalendarFeed)
  read(
    @Input() input: HandlerInput<typeof routes.readCalendarFeed>,
    @Req() request: Request,
    @Res({ passthrough: true }) response: Response,
  ): StreamableFile {
    const text = this.feeds.read(input.params.token, request.ip ?? '');
    response.setHeader('Cache-Control', 'private, no-store');
    return new StreamableFile(Buffer.from(text), { type: 'text/calendar; charset=utf-8' });
  }
}
