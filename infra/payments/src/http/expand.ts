import { currentBalanceTransaction } from '../core/balance.js';
import type { Desk } from '../core/desk.js';
import { badParameter } from '../core/errors.js';
import { type Kinds, kindOfId } from '../core/kinds.js';

const DEPTH_MAX = 4;

type Fields = Record<string, unknown>;

function isFields(value: unknown): value is Fields {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/**
 * Replaces ids by the objects they name, along the asked paths ("latest_charge.balance_transaction", "data.customer").
 * The answer is changed in place; it is a copy of what is stored.
 */
export function expandAll(desk: Desk, account: string, answer: object, paths: readonly string[]): void {
  for (const path of paths) {
    const steps = path.split('.');
    if (steps.length > DEPTH_MAX)
      throw badParameter('expand', `You cannot expand more than ${DEPTH_MAX} levels: ${path}`);
    expandPath(desk, account, answer, steps, path);
  }
}

function expandPath(desk: Desk, account: string, value: unknown, steps: readonly string[], path: string): void {
  if (Array.isArray(value)) {
    for (const item of value) expandPath(desk, account, item, steps, path);
    return;
  }
  const [step, ...rest] = steps;
  if (step === undefined || value === null) return;
  if (!isFields(value)) throw notExpandable(path);
  if (step === 'refunds' && value.object === 'charge') value.refunds = refundsOf(desk, account, value.id);
  if (!Object.hasOwn(value, step)) throw notExpandable(path);
  const current = value[step];
  if (typeof current === 'string') {
    const found = lookUp(desk, account, current);
    if (!found) throw notExpandable(path);
    value[step] = found;
  } else if (current !== null && typeof current !== 'object') {
    throw notExpandable(path);
  }
  expandPath(desk, account, value[step], rest, path);
}

function notExpandable(path: string): Error {
  return badParameter('expand', `This property cannot be expanded (${path}).`);
}

/** An account sees its own objects; the platform also sees accounts, and a destination's payments. */
function lookUp(desk: Desk, account: string, id: string): object | undefined {
  const kind = kindOfId(id);
  if (!kind) return undefined;
  const owner = desk.store.accountOf(id);
  if (owner === undefined || (owner !== account && account !== '')) return undefined;
  const found = desk.store.find(kind, id, owner);
  return found && kind === 'balance_transaction'
    ? currentBalanceTransaction(desk, found as Kinds['balance_transaction'])
    : found;
}

function refundsOf(desk: Desk, account: string, chargeId: unknown): object {
  const page = desk.store.list('refund', { account, where: { charge: String(chargeId) }, limit: 10 });
  return { object: 'list', data: page.items, has_more: page.hasMore, url: `/v1/charges/${String(chargeId)}/refunds` };
}
