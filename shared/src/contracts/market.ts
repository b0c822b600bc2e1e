/** Finding contact time: what passes, over which antennas, what of it is for sale, and why the rest is not. */
import { z } from 'zod';
import { AmountMinor, AzimuthDeg, Currency, ElevationDeg, Id, MaskPoints, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';
import { PassSource } from './ephemerides.js';

export const Need = z.enum(['downlink', 'uplink', 'both']);
export type Need = z.infer<typeof Need>;

/** AOS, highest point, LOS. */
const three = z.tuple([z.number(), z.number(), z.number()]);

export const PassGeometry = z.object({
  aosUtc: UtcTime,
  tcaUtc: UtcTime,
  losUtc: UtcTime,
  clippedStart: z.boolean(),
  clippedEnd: z.boolean(),
  azimuthDeg: three,
  elevationDeg: three,
  rangeKm: three,
  rangeRateKmPerS: three,
  maxElevationDeg: z.number(),
});
export type PassGeometry = z.infer<typeof PassGeometry>;

/** Elevation along the pass and the mask below it, in equal steps from AOS to LOS; what the board draws. */
export const Profile = z.object({
  elevationDeg: z.array(z.number()).min(2),
  maskDeg: z.array(z.number()).min(1).describe('as many, or one where the mask is the same all along'),
});
export type Profile = z.infer<typeof Profile>;

export const PriceLine = z.object({ label: z.string(), detail: z.string(), amountMinor: z.int() });
export type PriceLine = z.infer<typeof PriceLine>;

export const RefundStep = z.object({
  refundPercent: z.int(),
  hoursBeforeAos: z.number(),
  untilUtc: UtcTime.nullable(),
  now: z.boolean(),
});

export const Quote = z.object({
  currency: Currency,
  lines: z.array(PriceLine),
  totalMinor: AmountMinor.describe('before VAT'),
  vat: z.object({ ratePercent: z.number(), amountMinor: z.int(), note: z.string() }),
  toPayMinor: AmountMinor,
  ladder: z.array(RefundStep),
});
export type Quote = z.infer<typeof Quote>;

/** Why time cannot be sold: one word for the board, one sentence for the person, and what would make it possible. */
export const Reason = z.object({
  code: z.string(),
  word: z.string(),
  sentence: z.string(),
  remedy: z.string().nullable(),
});
export type Reason = z.infer<typeof Reason>;

export const SaleablePart = z.object({ aosUtc: UtcTime, losUtc: UtcTime, totalMinor: AmountMinor });

export const FoundPass = z.object({
  /** Stable for the same antenna, spacecraft and AOS; used in addresses. */
  key: z.string(),
  antennaId: Id,
  spacecraftId: Id,
  geometry: PassGeometry,
  profile: Profile,
  state: z.enum(['for sale', 'part for sale', 'not for sale', 'held', 'asked', 'berth', 'under way', 'done']),
  /** The caller's own booking on this pass, where there is one. */
  bookingId: Id.nullable(),
  source: PassSource.default('element set').describe('what it was computed from'),
  currency: Currency.nullable(),
  parts: z.array(SaleablePart),
  reasons: z.array(Reason),
});
export type FoundPass = z.infer<typeof FoundPass>;

export const Interval = z.object({ fromUtc: UtcTime, toUtc: UtcTime });

export const FoundStation = z.object({
  id: Id,
  name: z.string(),
  ownerName: z.string(),
  country: z.string(),
  timeZone: z.string(),
  latitudeDeg: z.number(),
  longitudeDeg: z.number(),
  nights: z.array(Interval),
  antennas: z.array(
    z.object({
      id: Id,
      name: z.string(),
      diameterM: z.number(),
      bands: z.array(z.string()),
      currency: Currency,
      perMinuteMinor: AmountMinor,
      acceptance: z.enum(['instant', 'owner']),
      blackouts: z.array(Interval.extend({ reason: z.string() })),
      /** Someone else's contacts: when, and nothing more. */
      taken: z.array(Interval),
    }),
  ),
});
export type FoundStation = z.infer<typeof FoundStation>;

export const SearchInput = z
  .object({
    spacecraftIds: z.array(Id).min(1, 'Choose at least one spacecraft.').max(100),
    need: Need.default('downlink'),
    bands: z.array(z.string()).max(8).default([]),
    fromUtc: UtcTime,
    toUtc: UtcTime,
    stationIds: z.array(Id).max(500).default([]),
    lowestElevationDeg: ElevationDeg.default(5).describe('the highest point must rise above it'),
    shortestS: z.int().min(0).max(86_400).default(0),
    highestPriceMinor: AmountMinor.nullable().default(null),
    searchId: Id.optional().describe('a name of your own, to ask for its progress'),
  })
  .refine((input) => input.toUtc > input.fromUtc, { path: ['toUtc'], message: 'The period must end after it begins.' })
  .refine((input) => Date.parse(input.toUtc) - Date.parse(input.fromUtc) <= 31 * 86_400_000, {
    path: ['toUtc'],
    message: 'Search at most 31 days at once.',
  });
export type SearchInput = z.infer<typeof SearchInput>;

export const SearchResult = z.object({
  computedUtc: UtcTime,
  stations: z.array(FoundStation),
  spacecraft: z.array(
    z.object({
      id: Id,
      name: z.string(),
      shortName: z.string(),
      elementsId: Id.nullable(),
      elementsEpochUtc: UtcTime.nullable(),
      ageH: z.number().nullable(),
      timingErrorS: z.number().nullable(),
      freshness: z.enum(['none', 'fresh', 'ageing', 'stale']),
      fault: z.string().nullable(),
    }),
  ),
  passes: z.array(FoundPass).describe('those of one spacecraft over one antenna stand together, by AOS'),
  counts: z.object({ forSale: z.int(), passes: z.int() }),
});
export type SearchResult = z.infer<typeof SearchResult>;

export const LinkLine = z.object({ label: z.string(), valueDb: z.number(), source: z.string() });

export const PassDetail = z.object({
  spacecraft: z.object({ id: Id, name: z.string(), shortName: z.string() }),
  antenna: z.object({
    id: Id,
    name: z.string(),
    stationName: z.string(),
    ownerName: z.string(),
    mask: MaskPoints,
    timeZone: z.string(),
  }),
  geometry: PassGeometry,
  /** The part asked for; equal to the pass where all of it is. */
  aosUtc: UtcTime,
  losUtc: UtcTime,
  track: z.array(
    z.object({
      timeUtc: UtcTime,
      azimuthDeg: AzimuthDeg,
      elevationDeg: z.number(),
      rangeKm: z.number(),
      rangeRateKmPerS: z.number(),
      sunlit: z.number().min(0).max(1),
    }),
  ),
  sun: z.object({
    azimuthDeg: z.number(),
    elevationDeg: z.number(),
    closestDeg: z.number().nullable().describe('null where the Sun is down all along'),
    keepOffDeg: z.number(),
  }),
  illumination: z.string().describe('a phrase: sunlit, eclipsed, or when it changes'),
  links: z.array(
    z.object({
      radioName: z.string(),
      direction: z.enum(['downlink', 'uplink']),
      band: z.string(),
      frequencyMhz: z.number(),
      dopplerHz: z.array(z.number()).describe('at the instants of the track'),
      marginDb: z.array(z.number()).describe('at the instants of the track; empty where nothing can be computed'),
      volumeBits: z.number().nullable(),
      budgetAtHighest: z.array(LinkLine),
      note: z.string(),
    }),
  ),
  source: PassSource,
  /** The operator's own, where some of the pass comes from one. */
  ephemeris: z
    .object({ id: Id, source: z.string(), startUtc: UtcTime, stopUtc: UtcTime, addedUtc: UtcTime })
    .nullable(),
  /** In force beside it, too. */
  /** What of the stretch the mount cannot follow, and why; the rest it can. */
  mountGaps: z.array(Interval.extend({ code: z.enum(['keyhole', 'travel', 'unwind']), sentence: z.string() })),
  elements: z.object({
    id: Id,
    epochUtc: UtcTime,
    ageH: z.number(),
    timingErrorS: z.number().nullable().describe('null where the pass comes from an ephemeris'),
    freshness: z.enum(['fresh', 'ageing', 'stale']),
  }),
  cautions: z.array(z.object({ title: z.string(), text: z.string() })),
  reasons: z.array(Reason),
  quote: Quote.nullable(),
  acceptance: z.enum(['instant', 'owner']),
});
export type PassDetail = z.infer<typeof PassDetail>;

export const BerthRequest = z.object({
  antennaId: Id,
  spacecraftId: Id,
  need: Need.default('downlink'),
  /** Bands of the search; they decide which radios and so which lowest elevation count. */
  bands: z.array(z.string()).max(8).default([]),
  aosUtc: UtcTime,
  losUtc: UtcTime,
});

const tag = 'market';
export const marketRoutes = {
  listMarketStations: defineRoute({
    name: 'listMarketStations',
    method: 'GET',
    path: '/api/market/stations',
    summary: 'Stations with antennas on sale',
    tag,
    access: 'market.search',
    data: 'market',
    response: z.object({
      items: z.array(
        z.object({
          id: Id,
          name: z.string(),
          country: z.string(),
          latitudeDeg: z.number(),
          longitudeDeg: z.number(),
          antennas: z.int(),
        }),
      ),
    }),
  }),
  searchPasses: defineRoute({
    name: 'searchPasses',
    method: 'POST',
    path: '/api/passes/search',
    summary:
      'Every pass in a period over every antenna that could serve, with what is for sale and why the rest is not',
    tag,
    access: 'market.search',
    data: 'market',
    body: SearchInput,
    response: SearchResult,
    idempotencyKey: 'none',
    errors: ['not-found', 'elements-unusable', 'too-large', 'unavailable'],
  }),
  searchProgress: defineRoute({
    name: 'searchProgress',
    method: 'GET',
    path: '/api/passes/search/:searchId',
    summary: 'How far a search is that was given a name; not found before it begins and after it ends',
    tag,
    access: 'market.search',
    data: 'market',
    params: z.object({ searchId: Id }),
    response: z.object({ done: z.int(), of: z.int().describe('pairs of spacecraft and antenna') }),
    errors: ['not-found'],
  }),
  passDetail: defineRoute({
    name: 'passDetail',
    method: 'POST',
    path: '/api/passes/detail',
    summary: 'One pass in full: track, link, Doppler, Sun, price and refund steps',
    tag,
    access: 'market.search',
    data: 'market',
    body: BerthRequest,
    response: PassDetail,
    idempotencyKey: 'none',
    errors: ['not-found', 'not-for-sale', 'elements-unusable'],
  }),
} as const;
