/** Translates between HTTP and live reports. */
import { Controller, Req, Res } from '@nestjs/common';
import { type ContactEvent, type ContactOrbit, type ResponseOf, routes } from '@skyberth/shared';
import type { Request, Response } from 'express';
import { BookingRepository } from '../bookings/bookings.repository.js';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { LiveService } from './live.service.js';
import { LiveHub } from './live-hub.js';

@Controller()
export class LiveController {
  constructor(
    private readonly live: LiveService,
    private readonly hub: LiveHub,
    private readonly bookings: BookingRepository,
  ) {}

  @Handles(routes.contactEvents)
  events(@Input() input: HandlerInput<typeof routes.contactEvents>): ResponseOf<typeof routes.contactEvents> {
    return this.live.events(input.caller, input.params.id);
  }

  @Handles(routes.contactOrbit)
  orbit(@Input() input: HandlerInput<typeof routes.contactOrbit>): Promise<ContactOrbit> {
    return this.live.orbit(input.caller, input.params.id);
  }

  @Handles(routes.contactLive)
  contact(
    @Input() input: HandlerInput<typeof routes.contactLive>,
    @Req() request: Request,
    @Res() response: Response,
  ): void {
    const { caller, params, query } = input;
    this.bookings.forViewer(caller, params.id);
    const listening = { viewer: caller, bookingId: params.id, stationId: null, personId: caller.personId };
    // Without a number a page of one contact is sent all of it: it is short, and nothing falls between asking and listening.
    this.hub.open({ ...listening, afterSeq: lastSeen(request) ?? query.after ?? 0 }, response);
  }

  @Handles(routes.organisationLive)
  organisation(
    @Input() input: HandlerInput<typeof routes.organisationLive>,
    @Req() request: Request,
    @Res() response: Response,
  ): void {
    const { caller, query } = input;
    const listening = {
      viewer: caller,
      bookingId: null,
      stationId: query.stationId ?? null,
      personId: caller.personId,
    };
    this.hub.open({ ...listening, afterSeq: lastSeen(request) ?? query.after ?? null }, response);
  }

  @Handles(routes.reportLive)
  report(@Input() input: HandlerInput<typeof routes.reportLive>): ContactEvent {
    return this.live.report(input.caller, input.params.id, input.body);
  }
}

/** The number that a browser sends when it comes back; anything else is taken as none. */
function lastSeen(request: Request): number | null {
  const text = request.header('last-event-id');
  return text !== undefined && /^\d{1,15}$/.test(text) ? Number(text) : null;
}
