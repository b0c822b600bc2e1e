/** People make and revoke secret calendar addresses; whoever knows one reads the contacts behind it. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { icalendar } from '@skyberth/orbit';
import {
  type BodyOf,
  type CalendarFeed,
  fillPath,
  MOST_CALENDAR_FEEDS,
  type Principal,
  type ResponseOf,
  routes,
} from '@skyberth/shared';
import { AttemptThrottle } from '../accounts/attempt-throttle.js';
import { CALENDAR_PRODUCT, contactEvent } from '../market/contact-event.js';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId, newSecret, sha256 } from '../platform/ids.js';
import { write } from '../platform/transaction.js';
import { CalendarFeedsRepository, type FeedContact, type NamedFeed } from './calendar-feeds.repository.js';

const SHOWN_FOR_MS = 60 * 86_400_000;
const MOST_CONTACTS = 3_000;
const REFRESH_MINUTES = 60;

@Injectable()
export class CalendarFeedsService {
  /** Nobody guesses 256 bits; a program that goes on with a dead address is slowed down. */
  private readonly wrong = new AttemptThrottle({ freeAttempts: 20, firstWaitMs: 1_000, longestWaitMs: 60_000 });
  /** A calendar that looks every minute or less often is never kept waiting. */
  private readonly reads = new AttemptThrottle({ freeAttempts: 60, firstWaitMs: 1_000, longestWaitMs: 60_000 });

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
    private readonly repository: CalendarFeedsRepository,
    private readonly audit: AuditService,
  ) {}

  list(caller: Principal): { items: CalendarFeed[] } {
    return { items: this.repository.of(caller.personId, caller.organisationId).map(viewOf) };
  }

  /** Throws `not-found` for an antenna of others, `wrong-state` where the person has too many. */
  make(
    caller: Principal,
    { antennaId }: BodyOf<typeof routes.makeCalendarFeed>,
  ): ResponseOf<typeof routes.makeCalendarFeed> {
    const antennaName = antennaId === null ? null : this.repository.ownAntenna(caller.organisationId, antennaId);
    if (antennaName === undefined) throw notFound('antenna');
    const { personId, organisationId } = caller;
    const token = newSecret();
    const row = {
      id: newId(),
      personId,
      organisationId,
      antennaId,
      hash: sha256(token),
      createdMs: this.clock.nowMs(),
    };
    write(this.db, (tx) => {
      if (this.repository.living(tx, personId, organisationId) >= MOST_CALENDAR_FEEDS) {
        throw new DomainError(
          'wrong-state',
          `You have ${MOST_CALENDAR_FEEDS} calendar addresses already. Revoke one that is not needed.`,
        );
      }
      this.repository.add(tx, row);
      const subject = `calendar-feed:${row.id}`;
      this.audit.record(tx, { caller, action: 'calendar-feed.make', subject, data: { antennaId } });
    });
    const url = this.config.publicUrl + fillPath(routes.readCalendarFeed.path, { token });
    return { feed: viewOf({ feed: { ...row, revokedMs: null }, antennaName }), url };
  }

  /** Throws `not-found` for an address of others as for one that was revoked. */
  revoke(caller: Principal, id: string): { ok: true } {
    const { personId, organisationId } = caller;
    return write(this.db, (tx) => {
      const isRevoked = this.repository.revoke(tx, { id, personId, organisationId }, this.clock.nowMs());
      if (!isRevoked) throw notFound('calendar address');
      this.audit.record(tx, { caller, action: 'calendar-feed.revoke', subject: `calendar-feed:${id}`, data: {} });
      return { ok: true };
    });
  }

  /** The calendar as text. Throws `not-found` once it is revoked or its maker has left, `too-many` for a hasty reader. */
  read(token: string, address: string): string {
    const nowMs = this.clock.nowMs();
    const hash = sha256(token);
    const known = this.repository.byHash(hash);
    if (!known) {
      this.wrong.begin(address, nowMs);
      throw notFound('calendar address');
    }
    this.reads.begin(hash, nowMs);
    const { viewer, feed, antennaName, organisationName } = known;
    const wish = { antennaId: feed.antennaId, fromMs: nowMs - SHOWN_FOR_MS, most: MOST_CONTACTS };
    const { publicUrl } = this.config;
    return icalendar(
      this.repository.contacts(viewer, wish).map((contact) => eventOf(contact, publicUrl)),
      {
        name: `Contacts, ${antennaName ?? organisationName}`,
        productId: CALENDAR_PRODUCT,
        refreshMinutes: REFRESH_MINUTES,
      },
    );
  }
}

/** Stamped with its last change: without a METHOD, DTSTAMP says when the entry was last revised (RFC 5545 3.8.7.2). */
function eventOf(contact: FeedContact, publicUrl: string) {
  const { booking, spacecraftName, antennaName, stationName, latitudeDeg, longitudeDeg } = contact;
  const summary = `${spacecraftName} over ${antennaName}`;
  const site = { latitudeDeg, longitudeDeg };
  return contactEvent(booking, { summary, stationName, site, publicUrl, stampMs: booking.changedMs });
}

const viewOf = ({ feed, antennaName }: NamedFeed): CalendarFeed => ({
  id: feed.id,
  antennaId: feed.antennaId,
  antennaName,
  createdUtc: new Date(feed.createdMs).toISOString(),
});
