/** What is told by mail about a clearance. */
import { Inject, Injectable } from '@nestjs/common';
import { utcText } from '../bookings/booking-words.js';
import { PartiesRepository } from '../bookings/parties.repository.js';
import { MailService } from '../mail/mail.service.js';
import { mailBody } from '../mail/mail-body.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import type { Db } from '../platform/transaction.js';
import type { ClearanceStep } from './clearance-transitions.js';
import type { NamedClearance } from './clearances.repository.js';

/** Stands in every mail about leave to transmit. */
const LICENCE_FIRST =
  'Transmitting without licence and coordination is unlawful and can harm other users. A clearance is no licence: local codes, the licence and licensed practitioners come first.';

interface Notice {
  /** Names the occasion; each is told once a clearance and address. */
  readonly occasion: string;
  readonly subject: string;
  readonly sentences: readonly string[];
}

@Injectable()
export class ClearanceNotices {
  constructor(
    private readonly parties: PartiesRepository,
    private readonly mail: MailService,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  requested(tx: Db, clearance: NamedClearance): void {
    const { operatorName, band, purpose } = clearance;
    this.send(tx, clearance, this.parties.workers(tx, clearance.ownerId), {
      occasion: 'requested',
      subject: `Please look at the papers: ${nameOf(clearance)}`,
      sentences: [`${operatorName} asks for leave to transmit in ${band} band: ${purpose}`],
    });
  }

  /** Everybody of either side hears of each step, except who took it. */
  moved(tx: Db, clearance: NamedClearance, step: ClearanceStep): void {
    const self = step.caller === null ? undefined : this.parties.emailOf(tx, step.caller.personId);
    const both = [clearance.operatorId, clearance.ownerId].flatMap((id) => this.parties.workers(tx, id));
    this.send(
      tx,
      clearance,
      both.filter((email) => email !== self),
      {
        occasion: step.act,
        subject: `Clearance ${clearance.state}: ${nameOf(clearance)}`,
        sentences: [step.sentence, ...(clearance.conditions ? [`Conditions: ${clearance.conditions}`] : [])],
      },
    );
  }

  /** To the operator, who has to renew it in time. */
  ends(tx: Db, clearance: NamedClearance, withinDays: number): void {
    const days = Math.max(1, Math.ceil((clearance.validToMs - this.clock.nowMs()) / 86_400_000));
    this.send(tx, clearance, this.parties.workers(tx, clearance.operatorId), {
      occasion: `ends within ${withinDays}`,
      subject: `Ends in ${days} ${days === 1 ? 'day' : 'days'}: ${nameOf(clearance)}`,
      sentences: ['No uplink is sold beyond its end. Renew it with new papers while there is time.'],
    });
  }

  private send(tx: Db, clearance: NamedClearance, to: readonly string[], notice: Notice): void {
    const body = mailBody({
      title: notice.subject,
      paragraphs: notice.sentences,
      facts: [
        ['Clearance', String(clearance.number)],
        ['Spacecraft', `${clearance.spacecraftName}, ${clearance.operatorName}`],
        ['Station', `${clearance.stationName}, ${clearance.ownerName}`],
        ['Band', clearance.band],
        ['From', utcText(clearance.validFromMs)],
        ['To', utcText(clearance.validToMs)],
      ],
      action: { label: 'Open the clearance', url: `${this.config.publicUrl}/clearances/${clearance.id}` },
      notes: [LICENCE_FIRST],
    });
    for (const email of new Set(to)) {
      const dedupeKey = `clearance:${clearance.id}:${notice.occasion}:${email}`;
      this.mail.queue(tx, { to: email, subject: notice.subject, ...body, dedupeKey });
    }
  }
}

/** `Whimbrel 5 at Tarnwick, S band`. */
const nameOf = (clearance: NamedClearance): string =>
  `${clearance.spacecraftName} at ${clearance.stationName}, ${clearance.band} band`;
