/** Messages between the two sides of a contact. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { BodyOf, Message, MessageSide, Principal, QueryOf, ResponseOf, routes } from '@skyberth/shared';
import { BookingNotices, contactName } from '../bookings/booking-notices.js';
import { BookingRepository, type BookingRow } from '../bookings/bookings.repository.js';
import { FileAccess } from '../files/file-access.js';
import { FilesService } from '../files/files.service.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { MessagesRepository } from './messages.repository.js';

const FILES = 'message';
const MINUTE_MS = 60_000;
/** More than a person types; a program that runs wild is stopped. */
const MOST_IN_A_MINUTE = 20;

@Injectable()
export class MessagesService implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: MessagesRepository,
    private readonly bookings: BookingRepository,
    private readonly files: FilesService,
    private readonly access: FileAccess,
    private readonly notices: BookingNotices,
    private readonly audit: AuditService,
  ) {}

  onModuleInit(): void {
    this.access.register(FILES, (caller, messageId) => {
      const message = this.repository.byId(this.db, messageId);
      return message !== undefined && this.sees(caller, message.bookingId);
    });
  }

  threads(caller: Principal, query: QueryOf<typeof routes.listThreads>): ResponseOf<typeof routes.listThreads> {
    const { page, pageSize, only } = query;
    const side = sideOf(caller);
    const asked = { side, personId: caller.personId, onlyNew: only === 'new', page, pageSize };
    const { rows, total } = this.repository.threads(caller, asked);
    return {
      items: rows.map(({ operatorName, ownerName, aosMs, lastMs, ...row }) => ({
        ...row,
        newCount: side === 'admin' ? 0 : row.newCount,
        otherName: { operator: ownerName, owner: operatorName, admin: `${operatorName} and ${ownerName}` }[side],
        aosUtc: utc(aosMs),
        lastUtc: utc(lastMs),
      })),
      total,
      page,
      pageSize,
    };
  }

  list(caller: Principal, bookingId: string): { items: Message[] } {
    this.bookings.forViewer(caller, bookingId);
    const rows = this.repository.ofBooking(bookingId);
    const read = this.repository.readUpTo(this.db, caller.personId, bookingId);
    const files = this.files.of(
      FILES,
      rows.map(({ row }) => row.id),
    );
    return {
      items: rows.map(({ row, name }) => ({
        id: row.id,
        side: row.side,
        byName: name,
        atUtc: utc(row.atMs),
        text: row.text,
        files: files.get(row.id) ?? [],
        isNew: caller.organisationKind !== 'staff' && row.side !== sideOf(caller) && row.seq > read,
      })),
    };
  }

  send(caller: Principal, bookingId: string, body: BodyOf<typeof routes.sendMessage>): Message {
    return write(this.db, (tx) => {
      const booking = this.bookings.forViewer(caller, bookingId, tx);
      const nowMs = this.clock.nowMs();
      if (this.repository.sentBy(tx, caller.personId, nowMs - MINUTE_MS) >= MOST_IN_A_MINUTE)
        throw new DomainError('too-many', `At most ${MOST_IN_A_MINUTE} messages a minute. Wait a moment.`);
      const side = sideOf(caller);
      const row = { id: newId(), bookingId, side, personId: caller.personId, atMs: nowMs, text: body.text };
      this.repository.add(tx, row);
      this.files.link(tx, { caller, subjectKind: FILES, subjectId: row.id, fileIds: body.fileIds });
      this.audit.record(tx, {
        caller,
        action: 'message.send',
        subject: `booking:${bookingId}`,
        data: { id: row.id, side },
      });
      this.tell(tx, booking, row);
      const files = this.files.of(FILES, [row.id], tx).get(row.id) ?? [];
      const sent = this.repository.ofBooking(bookingId, tx).find((one) => one.row.id === row.id);
      return { id: row.id, side, byName: sent?.name ?? '', atUtc: utc(nowMs), text: row.text, files, isNew: false };
    });
  }

  read(caller: Principal, bookingId: string, messageId: string): { ok: true } {
    return write(this.db, (tx) => {
      this.bookings.forViewer(caller, bookingId, tx);
      const message = this.repository.byId(tx, messageId);
      if (message?.bookingId !== bookingId) throw notFound('message');
      this.repository.markRead(tx, { personId: caller.personId, bookingId, seq: message.seq });
      return { ok: true };
    });
  }

  /** To the other side; what staff write goes to both. */
  private tell(tx: Db, booking: BookingRow, row: { id: string; side: MessageSide; text: string }): void {
    const name = contactName(this.notices.names(tx, booking));
    const from = { operator: 'The operator', owner: 'The station', admin: 'The marketplace' }[row.side];
    const notice = {
      kind: `message:${row.id}`,
      subject: `Message about berth ${booking.number}, ${name}`,
      sentences: [`${from} writes:`, row.text],
    };
    if (row.side !== 'operator') this.notices.toBuyer(tx, booking, notice);
    if (row.side !== 'owner') this.notices.toStation(tx, booking, notice);
  }

  private sees(caller: Principal, bookingId: string): boolean {
    try {
      this.bookings.forViewer(caller, bookingId);
      return true;
    } catch (error) {
      if (error instanceof DomainError && error.code === 'not-found') return false;
      throw error;
    }
  }
}

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

function sideOf({ organisationKind }: Principal): MessageSide {
  return organisationKind === 'staff' ? 'admin' : organisationKind;
}
