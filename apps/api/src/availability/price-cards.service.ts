/** Price cards that are, were and will be in force, and one contact worked out by a card that is not published yet. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { fromWallClock, isoWeekday, parseTimeOfDay, quote, startOfDay, toWallClock } from '@skyberth/market';
import { formatMoney } from '@skyberth/money';
import type { BodyOf, Principal, ResponseOf, routes } from '@skyberth/shared';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { notFound } from '../platform/domain-error.js';
import { AntennasRepository, type WholeAntenna } from '../stations/antennas.repository.js';
import { refuseBadPrice } from '../stations/input-checks.js';
import { priceView } from '../stations/station-views.js';
import { scopeOf } from '../stations/stations.service.js';

const DAY_MS = 86_400_000;
const HOUR_MS = 3_600_000;

@Injectable()
export class PriceCardsService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly antennas: AntennasRepository,
  ) {}

  list(caller: Principal, antennaId: string): ResponseOf<typeof routes.listPriceCards> {
    this.find(caller, antennaId);
    return { items: this.antennas.priceCards(this.db, antennaId).map(priceView) };
  }

  /** By the very arithmetic that sells: a contact on that weekday of the coming week, on the station's clock. */
  example(
    caller: Principal,
    antennaId: string,
    { price, contact }: BodyOf<typeof routes.priceExample>,
  ): ResponseOf<typeof routes.priceExample> {
    const { timeZone, currency } = this.find(caller, antennaId).station;
    refuseBadPrice(price, currency);
    const midnight = startOfDay(toWallClock(this.clock.nowMs(), timeZone));
    const days = (contact.day - isoWeekday(midnight) + 7) % 7;
    const fromMs = fromWallClock(midnight + days * DAY_MS + parseTimeOfDay(contact.startLocal) * 60_000, timeZone);
    const { lines, totalMinor } = quote(
      {
        card: { ...price, currency },
        fromMs,
        toMs: fromMs + contact.lengthS * 1_000,
        buyMs: fromMs - contact.boughtHoursBefore * HOUR_MS,
        monthlyMinutesSoFar: 0,
        timeZone,
      },
      (amountMinor, of) => formatMoney({ amountMinor, currency: of }),
    );
    return {
      currency,
      lines: lines.map(({ label, detail, amountMinor }) => ({ label, detail, amountMinor })),
      totalMinor,
    };
  }

  private find(caller: Principal, id: string): WholeAntenna {
    const nowMs = this.clock.nowMs();
    const whole = this.antennas.find(this.db, scopeOf(caller), id, { fromMs: nowMs, toMs: nowMs, nowMs });
    if (!whole) throw notFound('antenna');
    return whole;
  }
}
