/** What is wrong with a price card or a cancellation ladder, in sentences, before it is published. */
import { MarketError, type MarketFault } from '../market-error.js';
import { parseTimeOfDay } from '../time/local-time.js';
import type { BusyHours, LadderStep, PriceCard } from './price-types.js';

/** The most that one amount of a card may be, in minor units: a million of a two-decimal currency. */
export const HIGHEST_CARD_AMOUNT_MINOR = 100_000_000;
const MINUTES_A_WEEK = 7 * 1440;

/** Every fault; empty when the card can be published. `field` is the path within the card. */
export function validatePriceCard(card: PriceCard): MarketFault[] {
  const faults: MarketFault[] = [];
  const amount = (field: 'perMinuteMinor' | 'setupMinor' | 'minimumMinor', name: string) => {
    const value = card[field];
    if (!Number.isInteger(value) || value < 0 || value > HIGHEST_CARD_AMOUNT_MINOR) {
      faults.push({
        field,
        sentence: `${name} is ${value}; it must be a whole number of minor units from 0 to ${HIGHEST_CARD_AMOUNT_MINOR}.`,
      });
    }
  };
  amount('perMinuteMinor', 'The price a minute');
  amount('setupMinor', 'The set-up fee');
  amount('minimumMinor', 'The least charge');
  faults.push(...card.busyHours.flatMap(busyFaults));
  if (faults.length === 0) faults.push(...busyOverlaps(card.busyHours));
  const notice = card.shortNotice;
  if (notice !== null && !(notice.underHours > 0))
    faults.push({
      field: 'shortNotice.underHours',
      sentence: `Short notice begins under ${notice.underHours} h; it must be above zero.`,
    });
  if (notice !== null && !(notice.percent >= 0 && notice.percent <= 300))
    faults.push({
      field: 'shortNotice.percent',
      sentence: `Short notice adds ${notice.percent} %; from 0 to 300 can be added.`,
    });
  card.volume.forEach((tier, index) => {
    if (!Number.isInteger(tier.overMinutesInMonth) || tier.overMinutesInMonth < 0)
      faults.push({
        field: `volume.${index}.overMinutesInMonth`,
        sentence: `A volume tier begins after ${tier.overMinutesInMonth} min; use whole minutes, none below zero.`,
      });
    if (!(tier.percent >= 0 && tier.percent <= 90))
      faults.push({
        field: `volume.${index}.percent`,
        sentence: `A volume tier takes off ${tier.percent} %; from 0 to 90 can be taken off.`,
      });
    const twin = card.volume.findIndex((other) => other.overMinutesInMonth === tier.overMinutesInMonth);
    if (twin < index)
      faults.push({
        field: `volume.${index}`,
        sentence: `Two volume tiers begin after ${tier.overMinutesInMonth} min.`,
      });
  });
  return faults;
}

function busyFaults(hours: BusyHours, index: number): MarketFault[] {
  const faults: MarketFault[] = [];
  const field = `busyHours.${index}`;
  if (hours.days.length === 0 || hours.days.some((day) => !Number.isInteger(day) || day < 1 || day > 7))
    faults.push({ field: `${field}.days`, sentence: 'Choose at least one day, 1 (Monday) to 7 (Sunday).' });
  if (!(hours.percent >= -90 && hours.percent <= 300))
    faults.push({
      field: `${field}.percent`,
      sentence: `Busy hours change the price by ${hours.percent} %; from −90 to 300 is possible.`,
    });
  for (const name of ['fromLocal', 'toLocal'] as const) {
    try {
      parseTimeOfDay(hours[name]);
    } catch (cause) {
      if (!(cause instanceof MarketError)) throw cause;
      faults.push({ field: `${field}.${name}`, sentence: cause.message });
    }
  }
  return faults;
}

/** Two rules over one minute would both add their percentage, which nobody means. */
function busyOverlaps(all: readonly BusyHours[]): MarketFault[] {
  const owner = new Int16Array(MINUTES_A_WEEK).fill(-1);
  const faults = new Map<string, MarketFault>();
  all.forEach((hours, index) => {
    const from = parseTimeOfDay(hours.fromLocal);
    const to = parseTimeOfDay(hours.toLocal);
    for (const day of hours.days) {
      for (let minute = from; minute < (to > from ? to : to + 1440); minute += 1) {
        const slot = ((day - 1) * 1440 + minute) % MINUTES_A_WEEK;
        const other = owner[slot] as number;
        if (other >= 0 && other !== index)
          faults.set(`${other}|${index}`, {
            field: `busyHours.${index}`,
            sentence: `The busy hours ${hours.fromLocal} to ${hours.toLocal} overlap others on the same day.`,
          });
        owner[slot] = index;
      }
    }
  });
  return [...faults.values()];
}

/** A ladder needs steps that fall: fewer hours, and not more money, from each to the next. */
export function validateLadder(ladder: readonly LadderStep[]): MarketFault[] {
  if (ladder.length === 0)
    return [{ field: 'ladder', sentence: 'Say what a cancellation brings back, in at least one step.' }];
  return ladder.flatMap((step, index): MarketFault[] => {
    const before = ladder[index - 1];
    const faults: MarketFault[] = [];
    if (!(step.hoursBeforeAos >= 0))
      faults.push({
        field: `ladder.${index}.hoursBeforeAos`,
        sentence: `A step ends ${step.hoursBeforeAos} h before AOS; it must not be below zero.`,
      });
    if (!(step.refundPercent >= 0 && step.refundPercent <= 100))
      faults.push({
        field: `ladder.${index}.refundPercent`,
        sentence: `A step gives back ${step.refundPercent} %; from 0 to 100 is possible.`,
      });
    if (before !== undefined && step.hoursBeforeAos >= before.hoursBeforeAos)
      faults.push({
        field: `ladder.${index}`,
        sentence: `Steps go from many hours to few, but ${step.hoursBeforeAos} h follows ${before.hoursBeforeAos} h.`,
      });
    if (before !== undefined && step.refundPercent > before.refundPercent)
      faults.push({
        field: `ladder.${index}`,
        sentence: `A later cancellation cannot bring back more: ${step.refundPercent} % follows ${before.refundPercent} %.`,
      });
    return faults;
  });
}
