import type Stripe from 'stripe';
import type { Work } from '../http/call.js';
import { idOf } from './common.js';

type Session = Stripe.Checkout.Session;

/** What the session needs to make its intent once somebody pays; the API does not show it. */
export interface SessionPlan {
  captureMethod: 'automatic_async' | 'manual';
  description: string | null;
  metadata: Stripe.Metadata;
  setupFutureUsage: 'off_session' | 'on_session' | null;
}

export function planOf(work: Work, session: Session): SessionPlan {
  return work.desk.store.hidden(session.id).plan as SessionPlan;
}

/** The session behind an intent that was just paid, or authorised, is complete: nobody can pay on its page again. */
export function completeSession(work: Work, intent: Stripe.PaymentIntent): void {
  const where = { payment_intent: intent.id };
  const session = work.desk.store.list('checkout.session', { account: work.account, where, limit: 1 }).items[0];
  if (session?.status !== 'open') return;
  const complete: Session = {
    ...session,
    status: 'complete',
    payment_status: intent.status === 'succeeded' ? 'paid' : 'unpaid',
    url: null,
  };
  work.desk.store.save<'checkout.session'>(complete);
  work.desk.unschedule('expire_session', session.id);
  work.desk.emit('checkout.session.completed', complete, work.account);
}

/** Closes an open session. Its intent, where there is one, is unpaid; the caller cancels it. */
export function closeSession(work: Work, session: Session): { expired: Session; intentId: string | null } {
  const expired: Session = { ...session, status: 'expired', url: null };
  work.desk.store.save<'checkout.session'>(expired);
  work.desk.unschedule('expire_session', session.id);
  work.desk.emit('checkout.session.expired', expired, work.account);
  return { expired, intentId: idOf(session.payment_intent) };
}
