/** Tax as finance looks it up: the tables that invoices are made from, and what a customer would be charged. */
import { Controller, Inject } from '@nestjs/common';
import {
  CURRENCY_CODES,
  checkVatNumber,
  currencyExponent,
  MoneyError,
  standardRates,
  vatNumberForms,
  vatTreatment,
} from '@skyberth/money';
import { type ResponseOf, routes } from '@skyberth/shared';
import { CONFIG, type Config } from '../platform/config.js';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { DomainError } from '../platform/domain-error.js';

const ROUNDING =
  'VAT is rounded once for each rate, on the sum of its lines, halves away from zero. No EU rule prescribes this or rounding by line (CJEU C-484/06), so each invoice keeps the rule that it was made by.';

@Controller()
export class TaxController {
  constructor(@Inject(CONFIG) private readonly config: Config) {}

  @Handles(routes.taxTable)
  table(): ResponseOf<typeof routes.taxTable> {
    const { name, address, vatNumber, feeBasisPoints } = this.config.marketplace;
    return {
      seller: { name, country: address.country, vatNumber },
      feeBasisPoints,
      rounding: ROUNDING,
      rates: standardRates().map(([country, steps]) => ({ country, steps: [...steps] })),
      vatNumbers: [...vatNumberForms()],
      currencies: CURRENCY_CODES.map((currency) => ({ currency, decimals: currencyExponent(currency) })),
    };
  }

  @Handles(routes.taxTreatment)
  treatment(@Input() input: HandlerInput<typeof routes.taxTreatment>): ResponseOf<typeof routes.taxTreatment> {
    const { country, day, vatNumber = null } = input.query;
    const { address, vatNumber: own } = this.config.marketplace;
    const checked = vatNumber === null ? null : checkVatNumber(vatNumber);
    try {
      const { customerVatNumberRequired: _required, ...treatment } = vatTreatment({
        supplier: { country: address.country, vatNumber: own },
        customer: { country, vatNumber },
        dateMs: Date.parse(`${day}T12:00:00Z`),
      });
      return { ...treatment, vatNumber: checked === null ? null : { ok: checked.ok, sentence: sentenceOf(checked) } };
    } catch (error) {
      if (!(error instanceof MoneyError)) throw error;
      throw new DomainError('bad-input', error.message, [{ pointer: '/query/day', detail: error.message }]);
    }
  }
}

const sentenceOf = (check: ReturnType<typeof checkVatNumber>): string =>
  check.ok
    ? `${check.number} has the right form${check.checked === 'check digits' ? ' and check digits' : ''}. Whether it is registered, only the tax office knows.`
    : check.sentence;
