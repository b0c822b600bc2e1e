/** Translates between HTTP and bookings. */
import { Readable } from 'node:stream';
import { Controller, Res, StreamableFile } from '@nestjs/common';
import { type Booking, type ResponseOf, routes } from '@skyberth/shared';
import type { Response } from 'express';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { BookingGeometry } from './booking-geometry.js';
import { BookingsService } from './bookings.service.js';

@Controller()
export class BookingsController {
  constructor(
    private readonly bookings: BookingsService,
    private readonly geometry: BookingGeometry,
  ) {}

  @Handles(routes.listBookings)
  list(@Input() input: HandlerInput<typeof routes.listBookings>): ResponseOf<typeof routes.listBookings> {
    return this.bookings.list(input.caller, input.query);
  }

  @Handles(routes.exportBookings)
  export(@Input() input: HandlerInput<typeof routes.exportBookings>): StreamableFile {
    return new StreamableFile(Readable.from(this.bookings.csvOf(input.caller, input.query), { objectMode: false }), {
      type: 'text/csv; charset=utf-8',
      disposition: 'attachment; filename="bookings.csv"',
    });
  }

  @Handles(routes.getBooking)
  get(@Input() input: HandlerInput<typeof routes.getBooking>): Booking {
    return this.bookings.get(input.caller, input.params.id);
  }

  @Handles(routes.bookingGeometry)
  geometryOf(
    @Input() input: HandlerInput<typeof routes.bookingGeometry>,
  ): Promise<ResponseOf<typeof routes.bookingGeometry>> {
    return this.geometry.detail(input.caller, input.params.id);
  }

  @Handles(routes.bookingFile)
  async file(
    @Input() input: HandlerInput<typeof routes.bookingFile>,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile> {
    const { body, contentType, fileName } = await this.geometry.file(input.caller, input.params.id, input.params.file);
    response.setHeader('Cache-Control', 'private, no-store');
    return new StreamableFile(Buffer.from(body), {
      type: contentType,
      disposition: `attachment; filename="${fileName}"`,
    });
  }

  @Handles(routes.holdBerth)
  hold(@Input() input: HandlerInput<typeof routes.holdBerth>): Promise<Booking> {
    return this.bookings.hold(input.caller, input.body);
  }

  @Handles(routes.letGo)
  letGo(@Input() input: HandlerInput<typeof routes.letGo>): Booking {
    return this.bookings.letGo(input.caller, input.params.id);
  }

  @Handles(routes.cancelBooking)
  cancel(@Input() input: HandlerInput<typeof routes.cancelBooking>): Booking {
    return this.bookings.cancel(input.caller, input.params.id, input.body);
  }

  @Handles(routes.acceptBooking)
  accept(@Input() input: HandlerInput<typeof routes.acceptBooking>): Booking {
    return this.bookings.accept(input.caller, input.params.id);
  }

  @Handles(routes.declineBooking)
  decline(@Input() input: HandlerInput<typeof routes.declineBooking>): Booking {
    return this.bookings.decline(input.caller, input.params.id, input.body.reason);
  }

  @Handles(routes.reportContact)
  report(@Input() input: HandlerInput<typeof routes.reportContact>): Booking {
    return this.bookings.report(input.caller, input.params.id, input.body);
  }
}
