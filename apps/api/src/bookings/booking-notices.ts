/** What both sides are told by mail about a booking. */
import { Inject, Injectable } from '@nestjs/common';
import { type MailDraft, MailService } from '../mail/mail.service.js';
import { mailBody } from '../mail/mail-body.js';
import { CONFIG, type Config } from '../platform/config.js';
import type { Db } from '../platform/transaction.js';
import { lengthText, moneyText, utcText } from './booking-words.js';
import type { BookingRow } from './bookings.repository.js';
import { type BookingNames, PartiesRepository } from './parties.repository.js';

export interface Notice {
  /** Names the occasion; each is told once a booking and address. */
  readonly kind: string;
  readonly subject: string;
  readonly sentences: readonly string[];
  readonly facts?: readonly (readonly [string, string])[];
  readonly attachments?: MailDraft['attachments'];
  readonly notes?: readonly string[];
}

/** Stands in every mail that sends someone towards a dish. */
const AT_THE_DISH =
  'A dish moves without warning and its transmitter can harm people near the beam. The licence, local rules and the station’s interlocks come first.';

@Injectable()
export class BookingNotices {
  constructor(
    private readonly parties: PartiesRepository,
    private readonly mail: MailService,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  /** To the person who bought. */
  toBuyer(tx: Db, booking: BookingRow, notice: Notice): void {
    const to = this.parties.emailOf(tx, booking.createdBy);
    if (to) this.send(tx, booking, { ...notice, to: [to] });
  }

  /** To whoever gets the operator's invoices. */
  toBilling(tx: Db, booking: BookingRow, notice: Notice): void {
    this.send(tx, booking, { ...notice, to: [this.parties.organisation(booking.operatorId, tx).billingEmail] });
  }

  /** To everyone who works at the station. */
  toStation(tx: Db, booking: BookingRow, notice: Notice): void {
    const to = this.parties.workers(tx, booking.ownerId);
    this.send(tx, booking, { ...notice, to, notes: [AT_THE_DISH, ...(notice.notes ?? [])] });
  }

  names(tx: Db, booking: BookingRow): BookingNames {
    return this.parties.names(booking.id, tx);
  }

  private send(tx: Db, booking: BookingRow, mail: Notice & { readonly to: readonly string[] }): void {
    const names = this.names(tx, booking);
    const body = mailBody({
      title: mail.subject,
      paragraphs: mail.sentences,
      facts: [...contactFacts(booking, names), ...(mail.facts ?? [])],
      action: { label: 'Open the contact', url: `${this.config.publicUrl}/bookings/${booking.id}` },
      notes: mail.notes ?? [],
    });
    for (const to of new Set(mail.to)) {
      this.mail.queue(tx, {
        to,
        subject: mail.subject,
        ...body,
        ...(mail.attachments ? { attachments: mail.attachments } : {}),
        dedupeKey: `booking:${booking.id}:${mail.kind}:${to}`,
      });
    }
  }
}

const contactFacts = (booking: BookingRow, names: BookingNames): [string, string][] => [
  ['Berth', String(booking.number)],
  ['Spacecraft', names.spacecraftName],
  ['Antenna', `${names.antennaName}, ${names.stationName}`],
  ['AOS', utcText(booking.aosMs)],
  ['LOS', utcText(booking.losMs)],
  ['Length', lengthText(booking.losMs - booking.aosMs)],
  ['Price', moneyText(booking.toPayMinor, booking.currency)],
];

/** `Whimbrel 5 at Tarnwick East`. */
export const contactName = (names: BookingNames): string => `${names.spacecraftName} at ${names.antennaName}`;
