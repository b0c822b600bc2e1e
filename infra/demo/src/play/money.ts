/** What makes money interesting: a monthly account, bills that are paid and one that is not, chargebacks, closed months. */
import { routes } from '@skyberth/shared';
import { type Actor, Refused } from './client.js';
import type { Company, PlayOperator } from './settle-in.js';
import type { Stage } from './stage.js';

const ON_ACCOUNT = 'Dunnage Weather';
const ASKS_LATE = 'Lanternfish Institute';
const LIMIT_MINOR = 400_000;

const operatorOf = (company: Company, name: string): PlayOperator => {
  const found = company.operators.find((one) => one.cast.name === name);
  if (!found) throw new Error(`${name} is not in the cast.`);
  return found;
};

/** One operator asks for a monthly account on the first day, and finance opens it. */
export async function openMonthlyAccount(stage: Stage, company: Company): Promise<void> {
  const { manager } = operatorOf(company, ON_ACCOUNT);
  const note = 'Two weather passes a day all year; our own books close monthly.';
  const { id } = await stage.call(manager, routes.askCredit, {
    body: { currency: 'EUR', wishedMinor: LIMIT_MINOR, note },
  });
  await stage.call(company.finance, routes.decideCredit, {
    params: { id },
    body: { decision: 'open', limitMinor: LIMIT_MINOR, termsDays: 14, reason: 'Known to us, and a steady buyer.' },
  });
}

/** Buys a hold on account where there is one that bears it; false where the buyer must take a card. */
export async function buyOnAccount(stage: Stage, operator: PlayOperator, bookingId: string): Promise<boolean> {
  if (operator.cast.name !== ON_ACCOUNT) return false;
  try {
    await stage.call(operator.manager, routes.buyOnAccount, { params: { id: bookingId } });
    return true;
  } catch (error) {
    if (error instanceof Refused && ['over-limit', 'wrong-state'].includes(error.code)) return false;
    throw error;
  }
}

/** Bills are paid a few days after they came; `payOnPage` enters the card on the provider's page. */
export async function payBills(
  stage: Stage,
  company: Company,
  payOnPage: (url: string) => Promise<void>,
): Promise<void> {
  const { manager } = operatorOf(company, ON_ACCOUNT);
  const { items } = await stage.call(manager, routes.myCredit, {});
  for (const bill of items.flatMap((account) => account.bills)) {
    if (bill.state === 'paid') continue;
    const { url } = await stage.call(manager, routes.payBill, { params: { id: bill.id } });
    if (url) await payOnPage(url);
  }
  await stage.settle();
}

/** A bank takes one of the latest card payments back; `verdict` is what it decides in the end, null while it thinks. */
export async function chargeBack(stage: Stage, company: Company, verdict: 'won' | 'lost' | null): Promise<void> {
  const before = await chargebackIds(stage, company.finance);
  const { items } = await stage.call(company.finance, routes.listMovements, {
    query: { state: 'matched', pageSize: 60 },
  });
  const charge = items.find((movement) => movement.type === 'charge' && movement.bookingId && movement.ageDays >= 2);
  if (!charge?.sourceId) return;
  try {
    await stage.hook('disputes', { charge: charge.sourceId, reason: 'product_not_received' });
  } catch {
    // The payment was refunded meanwhile, so that there is nothing to take back.
    return;
  }
  await stage.settle();
  if (verdict === null) return;
  const opened = (await chargebackIds(stage, company.finance)).find((id) => !before.includes(id));
  if (opened) await stage.hook(`disputes/${opened}/close`, { verdict });
  await stage.settle();
}

const chargebackIds = async (stage: Stage, finance: Actor): Promise<string[]> =>
  (await stage.call(finance, routes.listChargebacks, { query: {} })).items.map((item) => item.id);

/** Finance closes every month that is in order but the last one, which is left for the person who looks. */
export async function closeMonths(stage: Stage, company: Company): Promise<void> {
  await stage.call(company.finance, routes.runLedgerCheck, {});
  for (;;) {
    const { items } = await stage.call(company.finance, routes.listMonths, {});
    const over = items.filter((item) => item.state !== 'running' && item.state !== 'closed');
    const next = over.find((item) => item.state === 'can be closed');
    if (!next || over.length < 2) return;
    await stage.call(company.finance, routes.closeMonth, { params: { month: next.month } });
  }
}

/** Another operator asks for an account today; finance has it to decide. */
export async function askForAccount(stage: Stage, company: Company): Promise<void> {
  const { manager } = operatorOf(company, ASKS_LATE);
  await stage.call(manager, routes.askCredit, {
    body: { currency: 'EUR', wishedMinor: 250_000, note: 'A campaign of six weeks with daily passes.' },
  });
}
