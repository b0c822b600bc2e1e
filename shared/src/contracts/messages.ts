/** Words between the two sides of a contact, with files, kept with it. */
import { z } from 'zod';
import { BookingState } from '../booking-states.js';
import { Done, Id, IdParams, PageQuery, pageOf, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { AttachedFile, FileIds } from './files.js';

export const MessageSide = z.enum(['operator', 'owner', 'admin']);
export type MessageSide = z.infer<typeof MessageSide>;

export const Message = z.object({
  id: Id,
  side: MessageSide,
  byName: z.string(),
  atUtc: UtcTime,
  text: z.string(),
  files: z.array(AttachedFile),
  isNew: z.boolean().describe('from the other side, and this person has not read it'),
});
export type Message = z.infer<typeof Message>;

export const MessageThread = z.object({
  bookingId: Id,
  bookingNumber: z.int(),
  bookingState: BookingState,
  spacecraftName: z.string(),
  antennaName: z.string(),
  otherName: z.string().describe('the other side; for staff both'),
  aosUtc: UtcTime,
  lastUtc: UtcTime,
  lastByName: z.string(),
  lastText: z.string(),
  newCount: z.int(),
});
export type MessageThread = z.infer<typeof MessageThread>;

const tag = 'messages';
export const messageRoutes = {
  listThreads: defineRoute({
    name: 'listThreads',
    method: 'GET',
    path: '/api/messages',
    summary: 'Contacts with messages, the latest first',
    tag,
    access: 'messages.read',
    data: 'parties',
    query: PageQuery.extend({
      only: z.enum(['new']).optional(),
    }),
    response: pageOf(MessageThread),
  }),
  listMessages: defineRoute({
    name: 'listMessages',
    method: 'GET',
    path: '/api/bookings/:id/messages',
    summary: 'Messages about one contact, oldest first',
    tag,
    access: 'messages.read',
    data: 'parties',
    params: IdParams,
    response: z.object({ items: z.array(Message) }),
    errors: ['not-found'],
  }),
  sendMessage: defineRoute({
    name: 'sendMessage',
    method: 'POST',
    path: '/api/bookings/:id/messages',
    summary: 'Write to the other side; nothing sent can be changed',
    tag,
    access: 'messages.write',
    data: 'parties',
    params: IdParams,
    body: z.object({
      text: z.string().trim().min(1, 'Write the message first.').max(4_000, 'Use at most 4,000 characters.'),
      fileIds: FileIds.default([]),
    }),
    response: Message,
    status: 201,
    errors: ['not-found', 'too-large', 'too-many'],
  }),
  readMessages: defineRoute({
    name: 'readMessages',
    method: 'POST',
    path: '/api/bookings/:id/messages/read',
    summary: 'Everything up to this message has been read by the caller',
    tag,
    access: 'messages.read',
    data: 'parties',
    params: IdParams,
    body: z.object({ messageId: Id }),
    response: Done,
    idempotencyKey: 'none',
    errors: ['not-found'],
  }),
} as const;
