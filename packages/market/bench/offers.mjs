/**
 * How long the pure part of a search takes: 1 spacecraft, 200 antennas, 14 days, 20,000 bookings.
 * Run `npx tsc -b packages/market` first, then `node packages/market/bench/offers.mjs [rounds]`.
 */
import { availableParallelism } from 'node:os';
import { expandRules, offersFor, quote, weeklyRule } from '../dist/index.js';

const ANTENNAS = 200;
const DAYS = 14;
const BOOKINGS = 20_000;
const PASSES_A_DAY = 5;
const DAY_MS = 86_400_000;
const NOW = Date.UTC(2026, 11, 1);

let seed = 20_261_201;
/** A small repeatable generator (linear congruential, 32 bits), so that every run times the same market. */
const random = () => {
  seed = (Math.imul(seed, 1_664_525) + 1_013_904_223) >>> 0;
  return seed / 2 ** 32;
};

const antennaInputs = Array.from({ length: ANTENNAS }, (_, index) => {
  const passes = Array.from({ length: DAYS * PASSES_A_DAY }, (_each, place) => {
    const aosMs = NOW + ((place + random()) / PASSES_A_DAY) * DAY_MS;
    const lengthMs = 240_000 + random() * 420_000;
    return {
      id: `${index}-${place}`,
      aosMs,
      tcaMs: aosMs + lengthMs / 2,
      losMs: aosMs + lengthMs,
      clippedStart: false,
      clippedEnd: false,
      azimuthDeg: [random() * 360, random() * 360, random() * 360],
    };
  });
  const count = BOOKINGS / ANTENNAS;
  const bookings = Array.from({ length: count }, (_each, place) => {
    const guardFromMs = NOW + ((place + random() * 0.8) / count) * DAYS * DAY_MS;
    return {
      beam: 1,
      guardFromMs,
      guardToMs: guardFromMs + 600_000,
      startAzimuthDeg: random() * 360,
      endAzimuthDeg: random() * 360,
      mine: place % 10 === 0,
    };
  });
  const blackouts = Array.from({ length: 6 }, () => {
    const fromMs = NOW + random() * DAYS * DAY_MS;
    return { fromMs, toMs: fromMs + 4 * 3_600_000, reason: 'maintenance' };
  });
  const rules = [
    weeklyRule({
      id: 'hours',
      days: [1, 2, 3, 4, 5, 6, 7],
      fromLocal: '05:00',
      toLocal: '23:00',
      timeZone: index % 2 === 0 ? 'Europe/Oslo' : 'America/New_York',
      fromDate: '2026-01-01',
    }),
  ];
  const antenna = {
    name: `Antenna ${index}`,
    beams: 1,
    setupS: 90,
    teardownS: 30,
    minNoticeMin: 30,
    horizonDays: 30,
    minContactS: 180,
    maxContactS: 1200,
    partsAllowed: index % 3 !== 0,
    slewAzimuthDegPerS: 2,
  };
  return { antenna, passes, bookings, blackouts, rules };
});

const card = {
  currency: 'EUR',
  perMinuteMinor: 560,
  setupMinor: 1200,
  minimumMinor: 3200,
  busyHours: [{ days: [1, 2, 3, 4, 5], fromLocal: '17:00', toLocal: '21:00', percent: 20 }],
  shortNotice: { underHours: 2, percent: 10 },
  volume: [{ overMinutesInMonth: 300, percent: 12 }],
};
const write = (amountMinor, currency) => `${currency} ${amountMinor}`;

function round() {
  const began = performance.now();
  const opened = antennaInputs.map(({ rules }) => expandRules(rules, NOW, NOW + DAYS * DAY_MS));
  const expanded = performance.now();
  const results = antennaInputs.map(({ antenna, passes, bookings, blackouts }, index) =>
    offersFor({
      antenna,
      passes,
      bookings,
      blackouts,
      open: opened[index],
      spacecraft: 'Whimbrel 5',
      spacecraftContacts: [],
      objections: [],
      clearance: null,
      nowMs: NOW,
    }),
  );
  const offered = performance.now();
  let quotes = 0;
  for (const { suggested } of results.flat().flatMap((result) => result.offers)) {
    quote({ card, ...suggested, buyMs: NOW, monthlyMinutesSoFar: 0, timeZone: 'Europe/Oslo' }, write);
    quotes += 1;
  }
  const quoted = performance.now();
  const lost = results.flat().reduce((sum, result) => sum + result.lost.length, 0);
  return { availabilityMs: expanded - began, offersMs: offered - expanded, quotesMs: quoted - offered, quotes, lost };
}

const rounds = Math.min(Math.max(Number(process.argv[2] ?? 5), 1), 100);
console.log(
  `${ANTENNAS} antennas, ${DAYS} days, ${ANTENNAS * DAYS * PASSES_A_DAY} passes, ${BOOKINGS} bookings; Node ${process.version}, ${availableParallelism()} cores, one thread`,
);
for (let index = 0; index < rounds; index += 1) {
  const { availabilityMs, offersMs, quotesMs, quotes, lost } = round();
  console.log(
    `round ${index + 1}: availability ${availabilityMs.toFixed(0)} ms, offers ${offersMs.toFixed(0)} ms (${lost} lost stretches), ${quotes} quotes ${quotesMs.toFixed(0)} ms`,
  );
}
