import { badParameter, refused } from './errors.js';

/** Charged in whole units. List from published-values, section j (payment API documentation). */
export const ZERO_DECIMAL = new Set('bif clp djf gnf jpy kmf krw mga pyg rwf vnd vuv xaf xof xpf'.split(' '));

/** Three digits after the point; card networks want the last one to be 0. From memory of the payment API's documentation. */
const THREE_DECIMAL = new Set('bhd jod kwd omr tnd'.split(' '));

/** No digits after the point in ISO 4217, yet passed as hundredths for old reasons, so only whole hundreds are possible (section j, from memory). */
const WHOLE_HUNDREDS = new Set(['isk', 'ugx']);

const TWO_DECIMAL =
  'aed afn all amd ang aoa ars aud awg azn bam bbd bdt bgn bmd bnd bob brl bsd bwp byn bzd cad cdf chf cny cop crc cve czk dkk dop dzd egp etb eur fjd fkp gbp gel gip gmd gtq gyd hkd hnl htg huf idr ils inr jmd kes kgs khr kyd kzt lak lbp lkr lrd lsl mad mdl mkd mmk mnt mop mur mvr mwk mxn myr mzn nad ngn nio nok npr nzd pab pen pgk php pkr pln qar ron rsd sar sbd scr sek sgd shp sle sos srd std szl thb tjs top try ttd twd tzs uah usd uyu uzs wst xcd yer zar zmw';

const SUPPORTED = new Set([...ZERO_DECIMAL, ...THREE_DECIMAL, ...WHOLE_HUNDREDS, ...TWO_DECIMAL.split(' ')]);

/** Smallest charge by currency; from memory of the payment API's documentation. Others: one unit. */
const SMALLEST_MINOR: Readonly<Record<string, number>> = {
  usd: 50,
  eur: 50,
  gbp: 30,
  chf: 50,
  aud: 50,
  cad: 50,
  nzd: 50,
  sgd: 50,
  brl: 50,
  inr: 50,
  jpy: 50,
  dkk: 250,
  nok: 300,
  sek: 300,
  pln: 200,
  czk: 1500,
  huf: 17500,
  hkd: 400,
  mxn: 1000,
  aed: 200,
  ron: 200,
  bgn: 100,
};

/** "Up to 8 digits": section j. */
const LARGEST_MINOR = 99_999_999;

/** The currency in the API's spelling (lower case). */
export function knownCurrency(text: string, param = 'currency'): string {
  const currency = text.toLowerCase();
  if (!SUPPORTED.has(currency))
    throw badParameter(param, `Invalid currency: ${text}. It is not one that can be charged.`);
  return currency;
}

/** Digits after the point when an amount is shown to a person. */
export function shownDigits(currency: string): number {
  if (ZERO_DECIMAL.has(currency)) return 0;
  return THREE_DECIMAL.has(currency) ? 3 : 2;
}

/** Checks an amount that a card shall be charged with. */
export function checkChargeAmount(amountMinor: number, currency: string): void {
  checkAmount(amountMinor, currency, 'amount');
  const smallest = SMALLEST_MINOR[currency] ?? 1;
  if (amountMinor < smallest) {
    throw refused(`Amount must be at least ${smallest} ${currency}, in the smallest unit.`, {
      code: 'amount_too_small',
      param: 'amount',
    });
  }
}

/** Checks any amount of money that moves: positive, not too large, and possible in its currency. */
export function checkAmount(amountMinor: number, currency: string, param: string): void {
  if (amountMinor < 1)
    throw badParameter(param, 'This value must be greater than or equal to 1.', 'parameter_invalid_integer');
  if (amountMinor > LARGEST_MINOR) {
    throw refused(`Amount must be no more than ${LARGEST_MINOR} ${currency}, in the smallest unit.`, {
      code: 'amount_too_large',
      param,
    });
  }
  const step = THREE_DECIMAL.has(currency) ? 10 : WHOLE_HUNDREDS.has(currency) ? 100 : 1;
  if (amountMinor % step !== 0) {
    throw refused(`Amounts in ${currency} must be a multiple of ${step}, in the smallest unit.`, {
      code: 'invalid_charge_amount',
      param,
    });
  }
}
