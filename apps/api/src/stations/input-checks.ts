/** What an owner gives for hours and prices, checked by the market's own rules. */
import { validateLadder, validatePriceCard, validateRules, weeklyRule } from '@skyberth/market';
import type { FieldError, PriceCardInput, WeeklyRule } from '@skyberth/shared';
import type { z } from 'zod';
import { DomainError } from '../platform/domain-error.js';

/** Throws `bad-input` with one sentence for each rule that opens nothing, or overlaps itself or another. */
export function refuseBadRules(rules: readonly WeeklyRule[], timeZone: string, nowMs: number): void {
  const fromDate = new Date(nowMs).toISOString().slice(0, 10);
  const faults: FieldError[] = [];
  const usable = rules.flatMap((rule, index) => {
    try {
      return [weeklyRule({ ...rule, id: String(index + 1), timeZone, fromDate })];
    } catch (error) {
      faults.push({ pointer: `/rules/${index}`, detail: error instanceof Error ? error.message : String(error) });
      return [];
    }
  });
  if (faults.length === 0) {
    for (const { field, sentence } of validateRules(usable)) {
      const [id = '', ...rest] = field.split('.');
      faults.push({ pointer: ['/rules', Number(id) - 1, ...rest].join('/'), detail: sentence });
    }
  }
  refuse(faults);
}

/** Throws `bad-input` with one sentence for each thing that is wrong with a price. */
export function refuseBadPrice(card: z.output<typeof PriceCardInput>, currency: string): void {
  const faults = [...validatePriceCard({ ...card, currency }), ...validateLadder(card.ladder)];
  refuse(faults.map(({ field, sentence }) => ({ pointer: `/${field.replaceAll('.', '/')}`, detail: sentence })));
}

/** Cards are announced up to two years ahead. */
const FURTHEST_CARD_MS = 731 * 86_400_000;

/** Throws `bad-input` for a card that would hold from a time that has gone by, or from too far ahead. */
export function refuseBadValidFrom(validFromMs: number, nowMs: number): void {
  const detail =
    validFromMs < nowMs
      ? 'A price holds from now or from a time to come; what was sold before keeps its price.'
      : validFromMs > nowMs + FURTHEST_CARD_MS
        ? 'A price can be announced two years ahead at most.'
        : null;
  refuse(detail === null ? [] : [{ pointer: '/validFromUtc', detail }]);
}

function refuse(faults: readonly FieldError[]): void {
  const [first] = faults;
  if (first) throw new DomainError('bad-input', faults.map((fault) => fault.detail).join(' '), faults);
}
