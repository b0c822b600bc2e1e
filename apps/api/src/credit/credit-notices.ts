/** Mails about monthly accounts, to whoever gets the operator's invoices. */
import { Inject, Injectable } from '@nestjs/common';
import { moneyText } from '../bookings/booking-words.js';
import { MailService } from '../mail/mail.service.js';
import { mailBody } from '../mail/mail-body.js';
import { CONFIG, type Config } from '../platform/config.js';
import type { Db } from '../platform/transaction.js';
import { type AccountRow, type BillRow, CreditRepository } from './credit.repository.js';

interface Letter {
  readonly key: string;
  readonly subject: string;
  readonly paragraphs: readonly string[];
  readonly facts: readonly (readonly [string, string])[];
}

const REMINDERS = [
  { subject: 'Reminder', sentence: 'Perhaps it was overlooked: this bill is past its due date.' },
  { subject: 'Second reminder', sentence: 'This bill is more than a week past its due date.' },
  {
    subject: 'Last reminder',
    sentence: 'This bill is two weeks past its due date. Finance will now call you about it.',
  },
] as const;
export const REMINDER_STEPS = REMINDERS.length;

@Injectable()
export class CreditNotices {
  constructor(
    private readonly repository: CreditRepository,
    private readonly mail: MailService,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  decided(tx: Db, account: AccountRow): void {
    const limit = moneyText(account.limitMinor, account.currency);
    const sentences = {
      open: `Your monthly account in ${account.currency} is open up to ${limit}. Bills are due ${account.termsDays} days after they are sent.`,
      refused: `Your monthly account in ${account.currency} was not opened.`,
      closed: `Your monthly account in ${account.currency} is closed; contacts are paid by card from now on.`,
      asked: '',
    };
    this.send(tx, account, {
      key: `credit:${account.id}:decided:${account.decidedMs}`,
      subject: `Monthly account: ${account.state}`,
      paragraphs: [sentences[account.state], `Reason: ${account.reason}`],
      facts: [],
    });
  }

  billed(tx: Db, account: AccountRow, bill: BillRow): void {
    this.send(tx, account, {
      key: `credit:bill:${bill.id}`,
      subject: `Monthly bill ${bill.number}`,
      paragraphs: [
        `The contacts of ${bill.month} that were bought on account are collected here. Each has an invoice of its own, which was mailed when it was confirmed.`,
      ],
      facts: factsOf(bill),
    });
  }

  /** `step` from 1. */
  remind(tx: Db, account: AccountRow, reminder: { bill: BillRow; step: number }): void {
    const { bill, step } = reminder;
    const words = REMINDERS[step - 1];
    if (!words) throw new Error(`There is no reminder ${step}.`);
    this.send(tx, account, {
      key: `credit:reminder:${bill.id}:${step}`,
      subject: `${words.subject}: monthly bill ${bill.number}`,
      paragraphs: [words.sentence, 'Until it is paid, contacts can only be bought by card.'],
      facts: factsOf(bill),
    });
  }

  private send(tx: Db, account: AccountRow, letter: Letter): void {
    const to = this.repository.operator(account.operatorId).billingEmail;
    const body = mailBody({
      title: letter.subject,
      paragraphs: letter.paragraphs,
      facts: letter.facts,
      action: { label: 'Open the monthly account', url: `${this.config.publicUrl}/monthly-account` },
    });
    this.mail.queue(tx, { to, subject: letter.subject, ...body, dedupeKey: letter.key });
  }
}

const factsOf = (bill: BillRow): [string, string][] => [
  ['Bill', bill.number],
  ['Amount', moneyText(bill.totalMinor, bill.currency)],
  ['Due', new Date(bill.dueMs).toISOString().slice(0, 10)],
];
