/** The three months: elements renewed, contacts bought, flown and reported, some of it going wrong. */
import { type Booking, type FoundPass, routes } from '@skyberth/shared';
import { tleAt } from '../cast/elements.js';
import type { Chance } from './chance.js';
import { type Actor, Refused } from './client.js';
import { flyLive } from './live.js';
import { buyOnAccount } from './money.js';
import type { Company, PlayOperator } from './settle-in.js';
import type { Stage } from './stage.js';

const HOUR_MS = 3_600_000;
const DAY_MS = 24 * HOUR_MS;
const ELEMENTS_EVERY_DAYS = 4;
const USUAL_BYTES_PER_S = 110_000;

/** A contact that was bought and waits to be flown and reported. */
interface Bought {
  readonly bookingId: string;
  readonly losMs: number;
  readonly owner: Actor;
}

export class Season {
  /** Contacts from here on are reported live as well, which takes the play longer. */
  liveFromMs = Number.POSITIVE_INFINITY;
  /** Reports from here on name the volume that the link predicts; before, one rate serves all, which is faster to play. */
  predictFromMs = Number.POSITIVE_INFINITY;
  private readonly bytesPerS = new Map<string, number>();
  private bought: Bought[] = [];
  private setNumber = 1;

  constructor(
    private readonly stage: Stage,
    private readonly company: Company,
    private readonly chance: Chance,
  ) {}

  /** One day from `dayMs` (00:00 UTC) on. */
  async day(dayMs: number, index: number): Promise<void> {
    await this.stage.moveTo(dayMs + 5 * HOUR_MS);
    if (index % ELEMENTS_EVERY_DAYS === 0) await this.renewElements();
    for (const operator of this.company.operators) {
      const wanted = this.chance.about(operator.cast.contactsPerDay);
      if (wanted > 0) await this.buy(operator, wanted, dayMs + 8 * HOUR_MS, dayMs + 32 * HOUR_MS);
    }
    await this.flyUntil(dayMs + DAY_MS + 5 * HOUR_MS);
  }

  /** Every operator uploads what its flight dynamics worked out. */
  async renewElements(): Promise<void> {
    this.setNumber += 1;
    const epochMs = this.stage.nowMs() - 3 * HOUR_MS;
    for (const operator of this.company.operators) {
      const text = operator.spacecraft.map(({ cast }) => tleAt(cast, epochMs, this.setNumber)).join('\n');
      await this.stage.call(operator.manager, routes.saveElements, {
        body: { text, fileName: `elements-${this.setNumber}.txt` },
      });
    }
  }

  /** What is for sale to one spacecraft of the operator in a period, dearest water first. */
  async forSale(operator: PlayOperator, fromMs: number, toMs: number): Promise<FoundPass[]> {
    const { id } = this.chance.pick(operator.spacecraft);
    const result = await this.stage.call(operator.manager, routes.searchPasses, {
      body: {
        spacecraftIds: [id],
        need: 'downlink',
        bands: ['S'],
        fromUtc: utc(fromMs),
        toUtc: utc(toMs),
        lowestElevationDeg: 15,
        shortestS: 240,
      },
    });
    return result.passes.filter((pass) => pass.state === 'for sale' && pass.parts[0] !== undefined);
  }

  /** Buys up to `count` contacts. A pass that went meanwhile is left; a declined card is tried again with a good one. */
  async buy(operator: PlayOperator, count: number, fromMs: number, toMs: number): Promise<void> {
    const passes = await this.forSale(operator, fromMs, toMs);
    for (let bought = 0; bought < count && passes.length > 0; bought += 1) {
      const pass = passes.splice(Math.floor(this.chance.next() * passes.length), 1)[0];
      if (pass) await this.buyOne(operator, pass);
    }
  }

  /** Holds and pays for one pass; returns the booking, or null where it could not be had. */
  async buyOne(operator: PlayOperator, pass: FoundPass): Promise<string | null> {
    const bookingId = await this.hold(operator, pass);
    if (!bookingId) return null;
    const kind = this.chance.next();
    if (kind < 0.03) return null; // The hold is forgotten and lapses by itself.
    if (kind < 0.05) {
      await this.stage.call(operator.manager, routes.letGo, { params: { id: bookingId } });
      return null;
    }
    await this.pay(operator, bookingId);
    await this.stage.settle();
    const owner = this.company.ownerOf.get(pass.antennaId);
    if (!owner) throw new Error('An antenna without an owner was sold.');
    await this.answer(owner, bookingId);
    const part = pass.parts[0];
    if (kind > 0.93) await this.cancel(kind > 0.97 ? owner : operator.manager, bookingId);
    else this.bought.push({ bookingId, losMs: Date.parse(part?.losUtc ?? pass.geometry.losUtc), owner });
    return bookingId;
  }

  async hold(operator: PlayOperator, pass: FoundPass): Promise<string | null> {
    const part = pass.parts[0];
    if (!part) return null;
    const wish = {
      antennaId: pass.antennaId,
      spacecraftId: pass.spacecraftId,
      need: 'downlink' as const,
      aosUtc: part.aosUtc,
      losUtc: part.losUtc,
    };
    try {
      const detail = await this.stage.call(operator.manager, routes.passDetail, { body: wish });
      if (!detail.quote) return null;
      const booking = await this.stage.call(operator.manager, routes.holdBerth, {
        body: { ...wish, expectedToPayMinor: detail.quote.toPayMinor },
      });
      return booking.id;
    } catch (error) {
      if (error instanceof Refused && ['berth-taken', 'spacecraft-busy', 'not-for-sale'].includes(error.code))
        return null;
      throw error;
    }
  }

  /** With the saved card; the first time on the payment page, which keeps the card. */
  async pay(operator: PlayOperator, bookingId: string): Promise<void> {
    if (await buyOnAccount(this.stage, operator, bookingId)) return;
    const params = { id: bookingId };
    const cards = await this.stage.call(operator.manager, routes.savedCards, {});
    const savedCardId = cards.items[0]?.id ?? null;
    const result = await this.stage.call(operator.manager, routes.checkout, {
      params,
      body: { savedCardId, saveCard: savedCardId === null },
    });
    if (result.kind === 'redirect') await payOnPage(result.url);
  }

  private async answer(owner: Actor, bookingId: string): Promise<void> {
    const booking = await this.stage.call(owner, routes.getBooking, { params: { id: bookingId } });
    if (booking.state !== 'awaiting owner') return;
    const params = { id: bookingId };
    if (this.chance.next() < 0.12)
      await this.stage.call(owner, routes.declineBooking, {
        params,
        body: { reason: 'Feed work that evening; try the dish beside it.' },
      });
    else await this.stage.call(owner, routes.acceptBooking, { params });
    await this.stage.settle();
  }

  private async cancel(who: Actor, bookingId: string): Promise<void> {
    const params = { id: bookingId };
    const booking = await this.stage.call(who, routes.getBooking, { params });
    if (!booking.actions.includes('cancel') || booking.refundNowMinor === null) return;
    await this.stage.call(who, routes.cancelBooking, {
      params,
      body: { reason: 'Plans changed.', expectedRefundMinor: booking.refundNowMinor },
    });
    await this.stage.settle();
  }

  /** Flies and reports everything whose LOS lies before `untilMs`, in its order. */
  async flyUntil(untilMs: number): Promise<void> {
    const due = this.bought.filter((one) => one.losMs < untilMs).sort((a, b) => a.losMs - b.losMs);
    this.bought = this.bought.filter((one) => one.losMs >= untilMs);
    for (const one of due) {
      if (one.losMs > this.liveFromMs) await flyLive(this.stage, this.chance, one);
      await this.stage.moveTo(one.losMs + 6 * 60_000);
      await this.report(one);
    }
  }

  /** Bytes a second that the link of this spacecraft to this antenna lets through. */
  private async rateOf(owner: Actor, booking: Booking): Promise<number> {
    const [aosMs, losMs] = [Date.parse(booking.aosUtc), Date.parse(booking.losUtc)];
    if (losMs < this.predictFromMs) return USUAL_BYTES_PER_S;
    const pair = `${booking.spacecraftName} ${booking.antennaName}`;
    const known = this.bytesPerS.get(pair);
    if (known !== undefined) return known;
    const { links } = await this.stage.call(owner, routes.bookingGeometry, { params: { id: booking.id } });
    const bits = links.reduce(
      (sum, { direction, volumeBits }) => sum + (direction === 'downlink' ? (volumeBits ?? 0) : 0),
      0,
    );
    const rate = (bits / 8 / (losMs - aosMs)) * 1000;
    this.bytesPerS.set(pair, rate);
    return rate;
  }

  private async report({ bookingId, owner }: Bought): Promise<void> {
    const params = { id: bookingId };
    const booking = await this.stage.call(owner, routes.getBooking, { params });
    if (booking.state !== 'reporting') return;
    const luck = this.chance.next();
    const outcome = luck < 0.03 ? 'failed' : luck < 0.09 ? 'degraded' : 'good';
    const cause =
      outcome === 'good'
        ? 'none'
        : this.chance.pick(
            outcome === 'failed'
              ? (['station', 'spacecraft', 'weather'] as const)
              : (['weather', 'interference'] as const),
          );
    const seconds = (Date.parse(booking.losUtc) - Date.parse(booking.aosUtc)) / 1000;
    const bytesPerS = await this.rateOf(owner, booking);
    await this.stage.call(owner, routes.reportContact, {
      params,
      body: {
        outcome,
        cause,
        acquiredUtc:
          outcome === 'failed'
            ? null
            : utc(Date.parse(booking.aosUtc) + 3_000 + Math.round(this.chance.next() * 4_000)),
        lostUtc: outcome === 'failed' ? null : utc(Date.parse(booking.losUtc) - Math.round(this.chance.next() * 5_000)),
        receivedBytes: outcome === 'failed' ? 0 : Math.round(seconds * bytesPerS * (outcome === 'good' ? 0.96 : 0.6)),
        ebN0Db: outcome === 'failed' ? null : Math.round((8 + this.chance.next() * 5) * 10) / 10,
        note: outcome === 'good' ? '' : 'See the station log.',
      },
    });
    await this.stage.settle();
  }
}

export const utc = (timeMs: number): string => new Date(timeMs).toISOString();

/** Enters the published test number of a good card on the payment page, as a browser would. */
export async function payOnPage(url: string): Promise<void> {
  const fields = new URLSearchParams({ number: '4242 4242 4242 4242', expiry: '12/34', cvc: '123', name: 'Demo' });
  const answer = await fetch(url, { method: 'POST', body: fields, redirect: 'manual' });
  if (answer.status !== 303) throw new Error(`The payment page did not take the card: ${await answer.text()}`);
}
