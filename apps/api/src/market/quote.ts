/** A price as the buyer sees it: lines, VAT, total, and what a cancellation would bring back. */
import { type LadderStep, type Quote as PriceQuote, refund } from '@skyberth/market';
import type { Quote } from '@skyberth/shared';
import type { QuotedVat } from './tax.js';

export function quoteFor(question: {
  price: PriceQuote;
  vat: QuotedVat;
  ladder: readonly LadderStep[];
  aosMs: number;
  nowMs: number;
}): Quote {
  const { price, vat, ladder, aosMs, nowMs } = question;
  const toPayMinor = price.totalMinor + vat.amountMinor;
  const { steps } = refund({ ladder, aosMs, cancelMs: nowMs, paidMinor: toPayMinor });
  return {
    currency: price.currency,
    lines: price.lines.map(({ label, detail, amountMinor }) => ({ label, detail, amountMinor })),
    totalMinor: price.totalMinor,
    vat,
    toPayMinor,
    ladder: steps.map((step) => ({
      refundPercent: step.refundPercent,
      hoursBeforeAos: step.hoursBeforeAos,
      untilUtc: step.untilMs === null ? null : new Date(step.untilMs).toISOString(),
      now: step.now,
    })),
  };
}
