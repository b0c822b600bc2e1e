/** Track, link and files of a booked contact, for either side of it; the files also go out with mails. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { PassDetail, Principal } from '@skyberth/shared';
import { MailAttachments } from '../mail/mail-attachments.js';
import { type ContactFile, ContactFiles, type MadeFile } from '../market/contact-files.js';
import { MarketService } from '../market/market.service.js';
import { DATABASE } from '../platform/database.module.js';
import { CALENDAR_ATTACHMENT } from './booking-sale.service.js';
import { BookingRepository } from './bookings.repository.js';

@Injectable()
export class BookingGeometry implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    private readonly repository: BookingRepository,
    private readonly market: MarketService,
    private readonly files: ContactFiles,
    private readonly attachments: MailAttachments,
  ) {}

  onModuleInit(): void {
    this.attachments.register(CALENDAR_ATTACHMENT, (bookingId) => this.calendar(bookingId));
  }

  detail(caller: Principal, bookingId: string): Promise<PassDetail> {
    return this.market.geometryOf(this.repository.forViewer(caller, bookingId));
  }

  file(caller: Principal, bookingId: string, file: ContactFile): Promise<MadeFile> {
    return this.files.make(file, this.repository.forViewer(caller, bookingId));
  }

  private async calendar(bookingId: string): Promise<Buffer> {
    const booking = this.repository.byId(this.db, bookingId);
    if (!booking) throw new Error(`There is no booking ${bookingId}.`);
    return Buffer.from((await this.files.make('contact.ics', booking)).body);
  }
}
