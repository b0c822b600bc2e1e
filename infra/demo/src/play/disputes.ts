/** Disputes: a few decided over the months, and at the present one of each kind that a visitor should meet. */
import { type BookingSummary, type DisputeReason, routes } from '@skyberth/shared';
import type { Actor } from './client.js';
import { utc } from './days.js';
import type { Company, PlayOperator } from './settle-in.js';
import type { Stage } from './stage.js';

const DAY_MS = 86_400_000;
const TEN_DAYS_MS = 10 * DAY_MS;

interface Story {
  readonly reason: DisputeReason;
  readonly text: string;
  readonly answer: string | null;
  readonly ruling: {
    readonly basisPoints: number;
    readonly borneBy: 'owner' | 'marketplace';
    readonly text: string;
  } | null;
}

const STORIES: readonly Story[] = [
  {
    reason: 'signal broken off',
    text: 'Frames stopped in the middle of the contact while the spacecraft went on transmitting; our own receiver heard its beacon all along.',
    answer: 'The receiver raised an alarm and was restarted. We saw the spacecraft again after that.',
    ruling: {
      basisPoints: 4_000,
      borneBy: 'owner',
      text: 'The alarm covers the whole gap; geometry and margin rule out the spacecraft. Data before and after were good.',
    },
  },
  {
    reason: 'poor signal',
    text: 'Eb/N0 stayed far below what the prediction promised.',
    answer: 'Rain over the station; the level was what the weather allowed.',
    ruling: {
      basisPoints: 0,
      borneBy: 'owner',
      text: 'The volume reached what was predicted for most of the pass. Rain is named in the terms of the station.',
    },
  },
  {
    reason: 'wrong configuration',
    text: 'The station recorded the wrong polarisation; nothing could be decoded.',
    answer: 'The order that reached us named the other polarisation.',
    ruling: {
      basisPoints: 10_000,
      borneBy: 'marketplace',
      text: 'The order was handed over wrongly by us. Neither side is at fault.',
    },
  },
];

/** One contact of the last days is disputed and decided; called now and then as the months pass. */
export async function disputeAndDecide(stage: Stage, company: Company, turn: number): Promise<void> {
  const story = STORIES[turn % STORIES.length] as Story;
  const operator = company.operators[turn % company.operators.length] as PlayOperator;
  const [booking] = await settledOf(stage, operator.manager, 1);
  if (booking) await play(stage, company, { operator: operator.manager, booking, story });
}

/** At the present: decided and open to appeal, appealed, answered and waiting, and just opened. */
export async function leaveDisputesOpen(stage: Stage, company: Company): Promise<void> {
  const [first, second] = company.operators;
  if (!first || !second) return;
  const [one, two, three] = await settledOf(stage, first.manager, 3);
  const [signal, poor] = STORIES as readonly [Story, Story, Story];
  if (one) await play(stage, company, { operator: first.manager, booking: one, story: { ...signal, ruling: null } });
  if (two) await play(stage, company, { operator: first.manager, booking: two, story: signal });
  if (three) {
    const id = await play(stage, company, { operator: first.manager, booking: three, story: poor });
    await stage.call(first.manager, routes.appealDecision, {
      params: { id },
      body: { text: 'The rain had ended before AOS, as the station’s own weather log says.' },
    });
  }
  const [fresh] = await settledOf(stage, second.manager, 1);
  if (fresh) {
    const story: Story = {
      ...poor,
      reason: 'data missing',
      text: 'Two files of the contact are missing.',
      answer: null,
      ruling: null,
    };
    await play(stage, company, { operator: second.manager, booking: fresh, story });
  }
  await stage.settle();
}

/** Settled contacts of the last days, newest first, that nobody disputed and none of which was given back. */
async function settledOf(stage: Stage, operator: Actor, most: number): Promise<BookingSummary[]> {
  const { items } = await stage.call(operator, routes.listBookings, {
    query: { state: 'settled', sort: '-aos', fromUtc: utc(stage.nowMs() - TEN_DAYS_MS), pageSize: 20 },
  });
  const invoices = await stage.call(operator, routes.listInvoices, { query: { pageSize: 100 } });
  const credited = invoices.items.flatMap((one) => (one.kind === 'credit note' ? [one.bookingId] : []));
  const found: BookingSummary[] = [];
  for (const booking of items) {
    if (found.length === most) break;
    if (credited.includes(booking.id)) continue;
    const { total } = await stage.call(operator, routes.listDisputes, { query: { bookingId: booking.id } });
    if (total === 0) found.push(booking);
  }
  return found;
}

async function play(
  stage: Stage,
  company: Company,
  { operator, booking, story }: { operator: Actor; booking: BookingSummary; story: Story },
): Promise<string> {
  const [aosMs, losMs] = [Date.parse(booking.aosUtc), Date.parse(booking.losUtc)];
  const at = (share: number): string => utc(Math.round((aosMs + (losMs - aosMs) * share) / 1000) * 1000);
  const isGap = story.reason === 'signal broken off';
  const dispute = await stage.call(operator, routes.openDispute, {
    params: { id: booking.id },
    body: {
      reason: story.reason,
      text: story.text,
      gapFromUtc: isGap ? at(0.38) : null,
      gapToUtc: isGap ? at(0.78) : null,
      observations: isGap
        ? [
            { atUtc: at(0.02), kind: 'heard', words: 'First frame, counter 118 204' },
            { atUtc: at(0.38), kind: 'stopped', words: 'Frames stop, counter 121 377' },
            { atUtc: at(0.6), kind: 'note', words: 'Beacon heard by our own receiver' },
            { atUtc: at(0.78), kind: 'heard', words: 'Frames resume, 2 310 missing' },
            { atUtc: at(0.97), kind: 'heard', words: 'Last frame, counter 126 950' },
          ]
        : [],
    },
  });
  const params = { id: dispute.id };
  const owner = company.ownerOf.get(booking.antennaId);
  if (owner && story.answer !== null) {
    await stage.call(owner, routes.stateInDispute, {
      params,
      body: {
        text: story.answer,
        observations: isGap ? [{ atUtc: at(0.42), kind: 'note', words: 'Receiver alarm, looking' }] : [],
      },
    });
  }
  if (story.ruling) {
    const { basisPoints, borneBy, text } = story.ruling;
    const outcome = basisPoints === 0 ? 'none' : basisPoints === 10_000 ? 'full' : 'part';
    const terms = { outcome, refundBasisPoints: basisPoints, borneBy } as const;
    const effect = await stage.call(company.admin, routes.previewDecision, { params, body: terms });
    await stage.call(company.admin, routes.decideDispute, {
      params,
      body: { terms, text, expectedRefundMinor: effect.refundMinor },
    });
  }
  await stage.settle();
  return dispute.id;
}
