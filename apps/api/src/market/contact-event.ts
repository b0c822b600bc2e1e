/** A booked contact as an entry of a calendar: the same entry in the file of one contact and in a feed of many. */
import type { CalendarEvent } from '@skyberth/orbit';
import type { Need } from '@skyberth/shared';
import { MOVING_DISH, TRANSMITTING } from './cautions.js';

/** Names the maker of the text, RFC 5545 3.7.3. */
export const CALENDAR_PRODUCT = '-//Skyberth//Contacts//EN';

export interface CalendarContact {
  readonly id: string;
  readonly number: number;
  readonly need: Need;
  readonly state: string;
  readonly aosMs: number;
  readonly losMs: number;
  /** Goes up with each change, so that a calendar replaces its entry. */
  readonly changedMs: number;
}

export interface EventSetting {
  readonly summary: string;
  readonly stationName: string;
  readonly site: { readonly latitudeDeg: number; readonly longitudeDeg: number };
  readonly publicUrl: string;
  readonly stampMs: number;
}

/** The UID stays for ever, the sequence goes up with each change (RFC 5545 3.8.4.7 and 3.8.7.4). */
export function contactEvent(contact: CalendarContact, setting: EventSetting): CalendarEvent {
  const cautions = contact.need === 'downlink' ? [MOVING_DISH] : [TRANSMITTING, MOVING_DISH];
  return {
    uid: `contact-${contact.id}@skyberth.example`,
    stampMs: setting.stampMs,
    startMs: contact.aosMs,
    endMs: contact.losMs,
    summary: setting.summary,
    description: [
      `Booking ${contact.number}. AOS and LOS are kept to the second here; the contact page has them exactly.`,
      ...cautions.map(({ title, text }) => `${title}. ${text}`),
    ].join('\n'),
    location: setting.stationName,
    place: setting.site,
    url: `${setting.publicUrl}/bookings/${contact.id}`,
    status: calendarStatus(contact.state),
    sequence: Math.floor(contact.changedMs / 1000),
  };
}

const GONE = new Set(['cancelled', 'declined', 'lapsed']);
const OPEN = new Set(['held', 'awaiting owner']);

function calendarStatus(state: string): 'TENTATIVE' | 'CONFIRMED' | 'CANCELLED' {
  if (GONE.has(state)) return 'CANCELLED';
  return OPEN.has(state) ? 'TENTATIVE' : 'CONFIRMED';
}
