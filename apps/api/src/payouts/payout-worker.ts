/** Carries out approved lines: one transfer each, whatever dies in between. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { formatMoney, payoutArrivedEntry, payoutEntry, reverseEntry } from '@skyberth/money';
import { z } from 'zod';
import { LedgerService } from '../ledger/ledger.service.js';
import { MailService } from '../mail/mail.service.js';
import { mailBody } from '../mail/mail-body.js';
import { OutboxRunner } from '../outbox/outbox.runner.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DATABASE } from '../platform/database.module.js';
import { type Db, write } from '../platform/transaction.js';
import { PAYOUT_PORT, type PayoutPort } from './payout.port.js';
import { type LineRow, PayoutRepository, type RunRow } from './payouts.repository.js';

export const TRANSFER = 'payout.transfer';
const Order = z.object({ lineId: z.string() });

@Injectable()
export class PayoutWorker implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(PAYOUT_PORT) private readonly port: PayoutPort,
    private readonly repository: PayoutRepository,
    private readonly ledger: LedgerService,
    private readonly mail: MailService,
    private readonly runner: OutboxRunner,
  ) {}

  onModuleInit(): void {
    this.runner.register(TRANSFER, (payload) => this.transfer(payload));
  }

  private async transfer(payload: unknown): Promise<void> {
    const line = this.repository.line(this.db, Order.parse(payload).lineId);
    if (line.state !== 'paying') return;
    const run = this.repository.run(this.db, line.runId);
    const owner = this.repository.organisation(this.db, line.ownerId);
    const answer =
      owner.providerAccountId === null
        ? ({ kind: 'refused', why: 'The owner has no account to be paid to any more.' } as const)
        : await this.port.transfer({
            lineId: line.id,
            accountId: owner.providerAccountId,
            amountMinor: line.toPayMinor,
            currency: run.currency,
            description: `Skyberth payout ${run.number}`,
          });
    write(this.db, (tx) => {
      // Another worker may have been as far meanwhile.
      if (this.repository.line(tx, line.id).state !== 'paying') return;
      if (answer.kind === 'sent') this.paid(tx, run, line, answer.transferId);
      else this.failed(tx, run, line, answer.why);
    });
  }

  private paid(tx: Db, run: RunRow, line: LineRow, transferId: string): void {
    const { ownerId, toPayMinor: amountMinor } = line;
    this.repository.changeLine(tx, line.id, { state: 'paid', transferId, paidMs: this.clock.nowMs() });
    const head = { causeKey: `transfer:${transferId}`, cause: `Payout run ${run.number} sent`, currency: run.currency };
    this.ledger.post(tx, payoutArrivedEntry(head, { ownerId, amountMinor }), null);
    const owner = this.repository.organisation(tx, ownerId);
    const money = (minor: number) => formatMoney({ amountMinor: minor, currency: run.currency });
    const title = `${money(amountMinor)} are on their way to you`;
    const body = mailBody({
      title,
      paragraphs: [`Payout run ${run.number} settles ${line.contactCount} contacts.`],
      facts: [
        ['Settled', money(line.settledMinor)],
        ['Fee', money(-line.feeMinor)],
        ['Refunds', money(-line.refundMinor)],
        ['Set aside', money(-line.reserveMinor)],
        ['Adjusted', money(line.adjustedMinor)],
        ['Paid', money(amountMinor)],
      ],
      action: { label: 'Open your earnings', url: `${this.config.publicUrl}/invoices` },
    });
    this.mail.queue(tx, { to: owner.billingEmail, subject: title, ...body, dedupeKey: `payout:${line.id}` });
  }

  /** The money is the owner's earnings again, and its postings come in the next run. */
  private failed(tx: Db, run: RunRow, line: LineRow, why: string): void {
    const { ownerId, toPayMinor: amountMinor } = line;
    this.repository.changeLine(tx, line.id, { state: 'failed', note: why });
    this.repository.giveFree(tx, line.id);
    const head = { causeKey: `payout:${line.id}`, cause: `Payout run ${run.number}`, currency: run.currency };
    const back = { causeKey: `payout-failed:${line.id}`, cause: `Payout run ${run.number}, transfer refused` };
    this.ledger.post(tx, reverseEntry(payoutEntry(head, { ownerId, amountMinor }), back), null);
  }
}
