import { PLATFORM } from '../core/store.js';
import { setAccountActive } from '../objects/account-life.js';
import { refundableMinor } from '../objects/charge-life.js';
import { closeDispute, openDispute } from '../objects/dispute-life.js';
import { returnPayout } from '../objects/payout-life.js';
import { textOf, wholeNumber, word } from './body.js';
import type { Hook, HookTools } from './mount.js';

const DISPUTE_REASONS = ['fraudulent', 'product_not_received', 'duplicate', 'general'] as const;

/** What banks do of their own accord. */
export function moneyHooks(tools: HookTools): Record<string, Hook> {
  const { desk } = tools;
  const change = (work: () => object): object =>
    desk.store.transaction(() => {
      desk.cause = { requestId: null, idempotencyKey: null };
      return work();
    });
  return {
    disputes: (body) =>
      change(() => {
        const charge = desk.get('charge', textOf(body, 'charge'), PLATFORM, 'charge');
        const amount = wholeNumber(body, 'amountMinor', refundableMinor(charge));
        return openDispute(
          { desk, account: PLATFORM },
          charge,
          amount,
          word({ reason: 'fraudulent', ...body }, 'reason', DISPUTE_REASONS),
        );
      }),
    'disputes/:id/close': (body, params) =>
      change(() =>
        closeDispute(
          { desk, account: PLATFORM },
          desk.get('dispute', params.id ?? ''),
          word(body, 'verdict', ['won', 'lost'] as const),
        ),
      ),
    'accounts/:id/activate': (_body, params) =>
      change(() => setAccountActive(desk, desk.get('account', params.id ?? ''), true)),
    'accounts/:id/restrict': (_body, params) =>
      change(() => setAccountActive(desk, desk.get('account', params.id ?? ''), false)),
    'payouts/:id/fail': (_body, params) => {
      const account = desk.store.accountOf(params.id ?? '') ?? PLATFORM;
      return change(() => returnPayout({ desk, account }, desk.get('payout', params.id ?? '', account), 'failed'));
    },
  };
}
