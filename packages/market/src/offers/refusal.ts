/** Why a pass cannot be sold as a whole, in one sentence with the part that can. */
import { totalMs } from '../interval.js';
import { lengthText, timeText } from '../words/words.js';
import {
  LOST_CODES,
  type LostCode,
  type LostStretch,
  type Offer,
  type OfferAntenna,
  type OfferPass,
  type PassOffers,
} from './offer-types.js';

const RANK = new Map<LostCode, number>(LOST_CODES.map((code, index) => [code, index]));

/** The heaviest reason leads: the one that takes most time, then the one that comes first in the order of reasons. */
export function refusalOf(
  pass: OfferPass,
  antenna: OfferAntenna,
  offers: readonly Offer[],
  lost: readonly LostStretch[],
): PassOffers['refusal'] {
  if (offers.some((offer) => offer.wholePass)) return null;
  const inWeight = (a: LostStretch, b: LostStretch): number =>
    b.toMs - b.fromMs - (a.toMs - a.fromMs) || (RANK.get(a.code) ?? 0) - (RANK.get(b.code) ?? 0);
  const causes = lost.filter((stretch) => stretch.code !== 'whole only' && stretch.code !== 'short');
  const lead = [...(causes.length > 0 ? causes : lost)].sort(inWeight)[0];
  if (lead === undefined) return wholeRefusal(pass, antenna, offers);
  const wholeOnly = lost.find((stretch) => stretch.code === 'whole only');
  const tail = wholeOnly === undefined ? partWords(pass, offers) : `${wholeOnly.sentence}`;
  return {
    word: lead.word,
    code: lead.code,
    sentence: tail === '' ? lead.sentence : `${lead.sentence} ${tail}`,
    remedy: lead.remedy,
  };
}

/** Nothing is lost, yet it cannot be bought as one: it is too long, or goes on beyond the period. */
function wholeRefusal(pass: OfferPass, antenna: OfferAntenna, offers: readonly Offer[]): PassOffers['refusal'] {
  if (pass.losMs - pass.aosMs > antenna.maxContactS * 1000) {
    return {
      word: 'long',
      code: 'long',
      sentence: `The pass lasts ${lengthText(pass.losMs - pass.aosMs)}; any part of up to ${lengthText(antenna.maxContactS * 1000)} can be bought.`,
      remedy: 'Choose a part.',
    };
  }
  return {
    word: 'cut off',
    code: 'period',
    sentence: `The pass goes on beyond the period looked at. ${partWords(pass, offers)}`.trim(),
    remedy: 'Widen the period to see the whole pass.',
  };
}

/** What can still be sold, as the end of a refusal's sentence. */
function partWords(pass: OfferPass, offers: readonly Offer[]): string {
  const [only, second] = offers;
  if (only === undefined) return '';
  if (second !== undefined) return `${offers.length} parts, together ${lengthText(totalMs(offers))}, could be sold.`;
  const length = lengthText(only.toMs - only.fromMs);
  if (only.toMs === pass.losMs) return `From ${timeText(only.fromMs, pass.aosMs)} the last ${length} could be sold.`;
  if (only.fromMs === pass.aosMs)
    return `The first ${length}, until ${timeText(only.toMs, pass.aosMs)}, could be sold.`;
  return `From ${timeText(only.fromMs, pass.aosMs)} to ${timeText(only.toMs, pass.aosMs)}, ${length} could be sold.`;
}
