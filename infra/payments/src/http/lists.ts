import type Stripe from 'stripe';
import { badParameter, missing } from '../core/errors.js';
import type { Input } from '../core/input.js';
import type { Kind, Kinds } from '../core/kinds.js';
import type { Call } from './call.js';

const PAGE_DEFAULT = 10;
const PAGE_MAX = 100;

export interface ListOptions {
  where?: Readonly<Record<string, string | number | undefined>>;
  types?: readonly string[] | undefined;
  account?: string;
}

/** Answers a list request: newest first, cursors by id, `has_more`. */
export function answerList<K extends Kind>(
  call: Call,
  kind: K,
  url: string,
  options: ListOptions = {},
): Stripe.ApiList<Kinds[K]> {
  const account = options.account ?? call.account;
  const limit = call.input.integer('limit') ?? PAGE_DEFAULT;
  if (limit < 1 || limit > PAGE_MAX)
    throw badParameter('limit', `limit must be between 1 and ${PAGE_MAX}, not ${limit}.`);
  const olderThan = cursor(call, kind, account, 'starting_after');
  const newerThan = cursor(call, kind, account, 'ending_before');
  if (olderThan !== undefined && newerThan !== undefined) {
    throw badParameter('starting_after', 'Give starting_after or ending_before, not both.', 'parameters_exclusive');
  }
  const created = readCreated(call.input);
  call.input.done();
  const page = call.desk.store.list(kind, {
    account,
    limit,
    ...(options.where ? { where: options.where } : {}),
    ...(options.types ? { types: options.types } : {}),
    ...(created ? { created } : {}),
    ...(olderThan === undefined ? {} : { olderThan }),
    ...(newerThan === undefined ? {} : { newerThan }),
  });
  return { object: 'list', data: page.items, has_more: page.hasMore, url };
}

function cursor(call: Call, kind: Kind, account: string, name: 'starting_after' | 'ending_before'): number | undefined {
  const id = call.input.text(name);
  if (id === undefined) return undefined;
  const sequence = call.desk.store.sequenceOf(id, kind, account);
  if (sequence === undefined) throw missing(kind.replaceAll('_', ' '), id, name);
  return sequence;
}

/** `created` as one second or as a range; whole seconds, so "greater than" is "from the next one". */
function readCreated(input: Input): { fromS?: number; toS?: number } | undefined {
  if (!input.has('created')) return undefined;
  try {
    const exact = input.integer('created');
    if (exact !== undefined) return { fromS: exact, toS: exact };
  } catch {
    // Not a single number, so it has to be a range.
  }
  const range = input.group('created');
  if (!range) return undefined;
  const [gt, gte, lt, lte] = [range.integer('gt'), range.integer('gte'), range.integer('lt'), range.integer('lte')];
  const fromS = gte ?? (gt === undefined ? undefined : gt + 1);
  const toS = lte ?? (lt === undefined ? undefined : lt - 1);
  return { ...(fromS === undefined ? {} : { fromS }), ...(toS === undefined ? {} : { toS }) };
}
