/**
 * The life of a booking: every state, and the only moves that exist between them. The API carries out no other move,
 * the database checks the same states, and pages and mails take their words from here.
 */
import { z } from 'zod';

export const BOOKING_STATES = [
  'held',
  'awaiting owner',
  'confirmed',
  'under way',
  'reporting',
  'settled',
  'lapsed',
  'declined',
  'cancelled',
  'failed',
  'in dispute',
] as const;
export const BookingState = z.enum(BOOKING_STATES);
export type BookingState = z.infer<typeof BookingState>;

/**
 * Who or what may cause a move. `operator` and `owner` are people of the two sides; `admin` is marketplace staff;
 * `payment` is a verified event of the payment provider, or the credit check of a monthly account; `clock` is a rule
 * that the job runner carries out when a time has come.
 */
export const BOOKING_ACTORS = ['operator', 'owner', 'admin', 'payment', 'clock'] as const;
export const BookingActor = z.enum(BOOKING_ACTORS);
export type BookingActor = z.infer<typeof BookingActor>;

export const BOOKING_CAUSES = [
  'hold',
  'let go',
  'hold ran out',
  'funds secured',
  'funds secured, owner asked',
  'owner accepts',
  'owner declines',
  'answer overdue',
  'authorisation ran out',
  'cancel',
  'pass lost',
  'contact begins',
  'contact ends',
  'contact broken off',
  'reported good',
  'reported failed',
  'report overdue',
  'dispute opened',
  'dispute settled',
  'dispute refunded',
  'appeal',
] as const;
export const BookingCause = z.enum(BOOKING_CAUSES);
export type BookingCause = z.infer<typeof BookingCause>;

/** What each state means. */
export interface BookingStateFacts {
  /** For a person, in a few words. */
  readonly meaning: string;
  /**
   * Whether the booking keeps the antenna's beam (with its set-up and teardown) from others. A contact that was flown
   * keeps its time for ever, so that no later booking can be written over what happened.
   */
  readonly occupiesAntenna: boolean;
  /** Whether the clock or a person will still move it; a final state only opens again through a dispute. */
  readonly open: boolean;
}

export const BOOKING_STATE_FACTS: Readonly<Record<BookingState, BookingStateFacts>> = {
  held: { meaning: 'Held at a frozen price for a few minutes; nothing is charged.', occupiesAntenna: true, open: true },
  'awaiting owner': { meaning: 'Funds are secured and the owner has been asked.', occupiesAntenna: true, open: true },
  confirmed: { meaning: 'Sold. Charged once the contact has taken place.', occupiesAntenna: true, open: true },
  'under way': { meaning: 'The contact is taking place.', occupiesAntenna: true, open: true },
  reporting: { meaning: 'The contact is over and its report is expected.', occupiesAntenna: true, open: true },
  settled: { meaning: 'Reported, charged and invoiced.', occupiesAntenna: true, open: false },
  lapsed: {
    meaning: 'The hold, the answer or the authorisation ran out; nothing was charged.',
    occupiesAntenna: false,
    open: false,
  },
  declined: { meaning: 'The owner declined; the funds were released.', occupiesAntenna: false, open: false },
  cancelled: {
    meaning: 'Cancelled before the contact; refunded by the agreed steps, or in full by the station.',
    occupiesAntenna: false,
    open: false,
  },
  failed: { meaning: 'The contact failed; released or refunded by cause.', occupiesAntenna: true, open: false },
  'in dispute': {
    meaning: 'The operator disputes the outcome; the money is set aside.',
    occupiesAntenna: true,
    open: true,
  },
};

export interface BookingTransition {
  /** `null` is the moment before the booking exists. */
  readonly from: BookingState | null;
  readonly event: BookingCause;
  readonly to: BookingState;
  readonly by: readonly BookingActor[];
  /** When it is permitted, for documentation and pages. */
  readonly when: string;
}

/** The one table of moves. No two rows share `from` and `event`, so an event leads to one state only. */
export const BOOKING_TRANSITIONS: readonly BookingTransition[] = [
  {
    from: null,
    event: 'hold',
    to: 'held',
    by: ['operator'],
    when: 'the time is for sale and no other booking keeps the beam',
  },
  { from: 'held', event: 'let go', to: 'cancelled', by: ['operator', 'admin'], when: 'at any time during the hold' },
  {
    from: 'held',
    event: 'hold ran out',
    to: 'lapsed',
    by: ['clock'],
    when: 'ten minutes after the hold without secured funds',
  },
  { from: 'held', event: 'funds secured', to: 'confirmed', by: ['payment'], when: 'the antenna is booked instantly' },
  {
    from: 'held',
    event: 'funds secured, owner asked',
    to: 'awaiting owner',
    by: ['payment'],
    when: 'the owner accepts each booking',
  },
  {
    from: 'held',
    event: 'pass lost',
    to: 'cancelled',
    by: ['admin', 'clock'],
    when: 'the pass, the clearance or the station fell away',
  },
  { from: 'awaiting owner', event: 'owner accepts', to: 'confirmed', by: ['owner'], when: 'before the answer is due' },
  { from: 'awaiting owner', event: 'owner declines', to: 'declined', by: ['owner'], when: 'before the answer is due' },
  {
    from: 'awaiting owner',
    event: 'answer overdue',
    to: 'lapsed',
    by: ['clock'],
    when: 'the time to answer has passed',
  },
  {
    from: 'awaiting owner',
    event: 'authorisation ran out',
    to: 'lapsed',
    by: ['payment', 'clock'],
    when: 'the authorisation ended and could not be renewed',
  },
  {
    from: 'awaiting owner',
    event: 'cancel',
    to: 'cancelled',
    by: ['operator', 'admin'],
    when: 'before the owner answers; nothing is charged',
  },
  {
    from: 'awaiting owner',
    event: 'pass lost',
    to: 'cancelled',
    by: ['admin', 'clock'],
    when: 'the pass, the clearance or the station fell away',
  },
  {
    from: 'confirmed',
    event: 'cancel',
    to: 'cancelled',
    by: ['operator', 'owner', 'admin'],
    when: 'before AOS: operator by the refund steps, owner and admin in full',
  },
  {
    from: 'confirmed',
    event: 'pass lost',
    to: 'cancelled',
    by: ['admin', 'clock'],
    when: 'newer elements lose the pass, or a clearance or the station fell away',
  },
  {
    from: 'confirmed',
    event: 'authorisation ran out',
    to: 'lapsed',
    by: ['payment', 'clock'],
    when: 'the funds could not be secured again before AOS',
  },
  {
    from: 'confirmed',
    event: 'contact begins',
    to: 'under way',
    by: ['owner', 'clock'],
    when: 'at AOS, or when the station reports the signal',
  },
  {
    from: 'under way',
    event: 'contact ends',
    to: 'reporting',
    by: ['owner', 'clock'],
    when: 'at LOS, or when the station reports the signal lost for good',
  },
  {
    from: 'under way',
    event: 'contact broken off',
    to: 'failed',
    by: ['owner', 'admin'],
    when: 'the station stops the contact and names the cause',
  },
  {
    from: 'reporting',
    event: 'reported good',
    to: 'settled',
    by: ['owner', 'admin'],
    when: 'the report says good or degraded',
  },
  {
    from: 'reporting',
    event: 'reported failed',
    to: 'failed',
    by: ['owner', 'admin'],
    when: 'the report says failed and names the cause',
  },
  {
    from: 'reporting',
    event: 'report overdue',
    to: 'settled',
    by: ['clock'],
    when: 'the station was reminded and live reports speak for the contact',
  },
  { from: 'reporting', event: 'dispute opened', to: 'in dispute', by: ['operator'], when: 'within 14 days of LOS' },
  { from: 'settled', event: 'dispute opened', to: 'in dispute', by: ['operator'], when: 'within 14 days of LOS' },
  { from: 'failed', event: 'dispute opened', to: 'in dispute', by: ['operator'], when: 'within 14 days of LOS' },
  {
    from: 'in dispute',
    event: 'dispute settled',
    to: 'settled',
    by: ['admin'],
    when: 'decided that all or part of the price stands',
  },
  {
    from: 'in dispute',
    event: 'dispute refunded',
    to: 'failed',
    by: ['admin'],
    when: 'decided that the price is returned in full',
  },
  { from: 'settled', event: 'appeal', to: 'in dispute', by: ['operator', 'owner'], when: 'once, against a decision' },
  { from: 'failed', event: 'appeal', to: 'in dispute', by: ['operator', 'owner'], when: 'once, against a decision' },
];

const byFromAndEvent = new Map(BOOKING_TRANSITIONS.map((move) => [`${move.from ?? ''}|${move.event}`, move]));

/** The move that `event` makes from `from` when `by` causes it, or `undefined` where the table has none. */
export function bookingTransition(
  from: BookingState | null,
  event: BookingCause,
  by: BookingActor,
): BookingTransition | undefined {
  const move = byFromAndEvent.get(`${from ?? ''}|${event}`);
  return move?.by.includes(by) ? move : undefined;
}

/** Every move open to `by` from `from`, in the order of the table: what a page may offer. */
export function bookingMoves(from: BookingState, by: BookingActor): readonly BookingTransition[] {
  return BOOKING_TRANSITIONS.filter((move) => move.from === from && move.by.includes(by));
}

/** Whether a booking in this state keeps the beam from others. */
export const occupiesAntenna = (state: BookingState): boolean => BOOKING_STATE_FACTS[state].occupiesAntenna;

/** The states that keep the beam, for the database's own refusal of overlaps. */
export const OCCUPYING_STATES: readonly BookingState[] = BOOKING_STATES.filter(occupiesAntenna);
