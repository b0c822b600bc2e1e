/** A market made up by rule for tests and measurements: the same numbers always make the same offers. */
import { type Candidate, DAY_MS } from './types.js';

export interface InventedMarket {
  readonly seed: number;
  readonly craft: number;
  readonly antennas: number;
  readonly days: number;
  readonly fromMs: number;
  /** Share of the antennas that a spacecraft can use. */
  readonly served?: number;
}

const MINUTE_MS = 60_000;

/**
 * Offers as a low orbit gives them: each spacecraft comes by each antenna in two clusters a day of two or three passes, 94
 * minutes apart; length, price by antenna and minute, and volume by length differ. Three antennas of ten can command.
 */
export function inventedOffers({ seed, craft, antennas, days, fromMs, served = 0.8 }: InventedMarket): Candidate[] {
  const chance = chanceFrom(seed);
  const dishes = Array.from({ length: antennas }, (_, place) => ({
    place,
    antennaId: `a${place}`,
    stationId: `s${Math.floor(place / 3)}`,
    perMinuteMinor: 300 + Math.round(chance() * 900),
    setupMinor: Math.round(chance() * 1_500),
    uplink: chance() < 0.3,
    phaseMs: chance() * DAY_MS,
  }));
  const offers: Candidate[] = [];
  for (let number = 0; number < craft; number += 1) {
    const bitsPerMs = 2_000 + chance() * 30_000;
    const orbitMs = (92 + chance() * 6) * MINUTE_MS;
    for (const dish of dishes) {
      if (chance() > served) continue;
      const phaseMs = dish.phaseMs + chance() * DAY_MS;
      for (let half = 0; half < days * 2; half += 1) {
        const clusterMs = (phaseMs % (DAY_MS / 2)) + (half * DAY_MS) / 2;
        const passes = 2 + Math.floor(chance() * 2);
        for (let pass = 0; pass < passes; pass += 1) {
          const lengthMs = Math.round((4 + chance() * 9) * MINUTE_MS);
          const aosMs = fromMs + Math.round(clusterMs + pass * orbitMs + chance() * MINUTE_MS);
          if (aosMs + lengthMs > fromMs + days * DAY_MS) continue;
          offers.push({
            id: `c${number}-${dish.antennaId}-${half}-${pass}`,
            craftId: `c${number}`,
            antennaId: dish.antennaId,
            stationId: dish.stationId,
            aosMs,
            losMs: aosMs + lengthMs,
            guardFromMs: aosMs - 3 * MINUTE_MS,
            guardToMs: aosMs + lengthMs + 2 * MINUTE_MS,
            beams: 1,
            priceMinor: dish.setupMinor + Math.round((lengthMs / MINUTE_MS) * dish.perMinuteMinor),
            currency: 'EUR',
            volumeBits: Math.round(lengthMs * bitsPerMs),
            uplink: dish.uplink,
            booked: false,
          });
        }
      }
    }
  }
  return offers;
}

/** Repeatable chance (mulberry32, a public-domain generator). */
export function chanceFrom(seed: number): () => number {
  let state = seed | 0;
  return () => {
    state = (state + 0x6d2b79f5) | 0;
    let t = Math.imul(state ^ (state >>> 15), 1 | state);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4_294_967_296;
  };
}
