/** What each scope lets a program do, in words. */
import type { ApiKeyScope } from '@skyberth/shared';

export const SCOPE_WORDS: Readonly<Record<ApiKeyScope, string>> = {
  'bookings.read': 'Read contacts, their files and what is reported live',
  'bookings.report': 'Report contacts, live and afterwards; enter and stop dishes; write hand-over notes',
  'run-sheet.read': 'Read the run sheet',
  'market.search': 'Search time for sale',
  'messages.read': 'Read messages, and mark them as read for you',
  'messages.write': 'Write messages to the other side',
};
