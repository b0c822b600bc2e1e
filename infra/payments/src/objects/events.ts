import { badParameter } from '../core/errors.js';
import type { StoredEvent } from '../core/kinds.js';
import { type Call, param, type Route } from '../http/call.js';
import { answerList } from '../http/lists.js';

const TYPES_MAX = 20;

function retrieve(call: Call): StoredEvent {
  call.input.done();
  return withPending(call, call.desk.get('event', param(call, 'id'), call.account));
}

function list(call: Call): object {
  const one = call.input.text('type');
  const several = call.input.texts('types');
  if (one !== undefined && several)
    throw badParameter('types', 'Give type or types, not both.', 'parameters_exclusive');
  if (several && several.length > TYPES_MAX) throw badParameter('types', `types takes up to ${TYPES_MAX} names.`);
  const page = answerList(call, 'event', '/v1/events', { types: one === undefined ? several : [one] });
  return { ...page, data: page.data.map((event) => withPending(call, event)) };
}

/** How many endpoints have not taken the event yet: the one thing about an event that changes. */
function withPending(call: Call, event: StoredEvent): StoredEvent {
  const row = call.desk.store
    .sql(
      "SELECT count(DISTINCT endpoint_id) AS pending FROM deliveries WHERE event_id = ? AND state IN ('waiting', 'held')",
    )
    .get(event.id);
  return { ...event, pending_webhooks: (row as { pending: number }).pending };
}

export const eventRoutes: readonly Route[] = [
  { method: 'GET', path: '/v1/events', run: list },
  { method: 'GET', path: '/v1/events/:id', run: retrieve },
];
