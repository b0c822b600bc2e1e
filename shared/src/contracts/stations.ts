/** Stations, antennas, masks, bands, availability and prices: what an owner describes once, and publishes. */
import { z } from 'zod';
import {
  AmountMinor,
  Band,
  Country,
  Currency,
  Done,
  ElevationDeg,
  FrequencyMhz,
  Id,
  IdParams,
  LatitudeDeg,
  LocalTime,
  LongitudeDeg,
  MaskPoints,
  Name,
  Note,
  PageQuery,
  Polarisation,
  pageOf,
  TimeZone,
  UtcTime,
} from '../primitives.js';
import { defineRoute } from '../route.js';

export const StationState = z.enum(['draft', 'waiting', 'approved', 'refused', 'suspended']);
export type StationState = z.infer<typeof StationState>;

export const StationInput = z.object({
  name: Name,
  latitudeDeg: LatitudeDeg,
  longitudeDeg: LongitudeDeg,
  altitudeM: z
    .number()
    .min(-500, 'Altitude lies from -500 m to 9,000 m.')
    .max(9_000, 'Altitude lies from -500 m to 9,000 m.'),
  country: Country,
  timeZone: TimeZone,
  currency: Currency,
  description: Note.default(''),
  contactName: z.string().trim().max(120).default(''),
  contactPhone: z.string().trim().max(40).default(''),
});

const bandFields = {
  direction: z.enum(['receive', 'transmit']),
  band: Band,
  fromMhz: FrequencyMhz,
  toMhz: FrequencyMhz,
  polarisations: z.array(Polarisation).min(1, 'Choose at least one polarisation.'),
  gOverTDbK: z.number().min(-40).max(60).nullable().describe('receive bands'),
  eirpDbw: z.number().min(-20).max(110).nullable().describe('transmit bands'),
  lowestElevationDeg: ElevationDeg.nullable().default(null),
};
export const AntennaBandInput = z
  .object(bandFields)
  .refine((band) => band.toMhz > band.fromMhz, { path: ['toMhz'], message: 'The band must end above where it begins.' })
  .refine((band) => (band.direction === 'receive' ? band.gOverTDbK !== null : band.eirpDbw !== null), {
    path: ['gOverTDbK'],
    message: 'A receive band needs G/T, a transmit band EIRP.',
  });
export const AntennaBand = z.object({ id: Id, ...bandFields });
export type AntennaBand = z.infer<typeof AntennaBand>;

export const Mount = z.enum(['az-el', 'x-y', 'tilted az-el']);

const antennaFields = {
  name: Name,
  diameterM: z.number().positive('A diameter is above zero.').max(100),
  mount: Mount,
  tiltDeg: z.number().min(0).max(45).default(0),
  slewAzimuthDegPerS: z.number().positive('A turning rate is above zero.').max(60),
  slewElevationDegPerS: z.number().positive('A turning rate is above zero.').max(60),
  lowestReceiveDeg: ElevationDeg,
  lowestTransmitDeg: ElevationDeg,
  setupS: z.int().min(0).max(3_600),
  teardownS: z.int().min(0).max(3_600),
  beams: z.int().min(1).max(8),
  minNoticeMin: z.int().min(0).max(20_160),
  horizonDays: z.int().min(1).max(365),
  minContactS: z.int().min(10).max(86_400),
  maxContactS: z.int().min(10).max(604_800),
  partsAllowed: z.boolean(),
  acceptance: z.enum(['instant', 'owner']),
  answerWithinMin: z
    .int()
    .min(5)
    .max(10_080)
    .describe('the owner answers within this time, and no later than the set-up'),
};
const lengthsInOrder = (antenna: { minContactS: number; maxContactS: number }) =>
  antenna.maxContactS >= antenna.minContactS;
const lengthsMessage = { path: ['maxContactS'], message: 'The longest contact cannot be shorter than the shortest.' };
export const AntennaInput = z.object(antennaFields).refine(lengthsInOrder, lengthsMessage);

export const PriceCardInput = z.object({
  perMinuteMinor: AmountMinor,
  setupMinor: AmountMinor,
  minimumMinor: AmountMinor,
  /** Station local time; a percentage on the per-minute part. */
  busyHours: z
    .array(
      z.object({
        days: z.array(z.int().min(1).max(7)).min(1),
        fromLocal: LocalTime,
        toLocal: LocalTime,
        percent: z.int().min(-90).max(300),
      }),
    )
    .max(20)
    .default([]),
  shortNotice: z
    .object({ underHours: z.number().positive().max(168), percent: z.int().min(0).max(300) })
    .nullable()
    .default(null),
  volume: z
    .array(z.object({ overMinutesInMonth: z.int().min(1), percent: z.int().min(0).max(90) }))
    .max(10)
    .default([]),
  /** Refund in percent when cancelled at least so many hours before AOS; falling. */
  ladder: z
    .array(z.object({ hoursBeforeAos: z.number().min(0).max(2_000), refundPercent: z.int().min(0).max(100) }))
    .min(1)
    .max(8),
});
export const PriceCard = PriceCardInput.extend({ id: Id, currency: Currency, validFromUtc: UtcTime });
export type PriceCard = z.infer<typeof PriceCard>;

export const WeeklyRule = z.object({
  days: z.array(z.int().min(1).max(7)).min(1, 'Choose at least one day.').describe('1 is Monday'),
  fromLocal: LocalTime,
  toLocal: LocalTime.describe('24:00 is the end of the day; earlier than the start runs past midnight'),
});
export type WeeklyRule = z.infer<typeof WeeklyRule>;

export const BlackoutInput = z
  .object({
    fromUtc: UtcTime,
    toUtc: UtcTime,
    reason: z.enum(['maintenance', 'own use', 'weather', 'other']),
    note: z.string().trim().max(120).default(''),
  })
  .refine((blackout) => blackout.toUtc > blackout.fromUtc, {
    path: ['toUtc'],
    message: 'A blackout must end after it begins.',
  });
export const Blackout = z.object({
  id: Id,
  antennaId: Id,
  fromUtc: UtcTime,
  toUtc: UtcTime,
  reason: z.string(),
  note: z.string(),
});
export type Blackout = z.infer<typeof Blackout>;

export const Antenna = z.object({
  id: Id,
  stationId: Id,
  stationName: z.string(),
  ...antennaFields,
  state: z.enum(['draft', 'on sale', 'paused']),
  version: z.int().describe('rises with every change that can move a pass'),
  mask: MaskPoints,
  maskReason: z.string(),
  bands: z.array(AntennaBand),
  availability: z.array(WeeklyRule),
  blackouts: z.array(Blackout),
  price: PriceCard.nullable(),
  missing: z.array(z.string()).describe('sentences: what it still needs before it can be sold'),
});
export type Antenna = z.infer<typeof Antenna>;

export const Station = StationInput.extend({
  id: Id,
  ownerName: z.string(),
  state: StationState,
  stateNote: z.string(),
  antennas: z.array(
    z.object({
      id: Id,
      name: z.string(),
      state: z.enum(['draft', 'on sale', 'paused']),
      diameterM: z.number(),
      bands: z.array(z.string()),
      missing: z.array(z.string()),
    }),
  ),
});
export type Station = z.infer<typeof Station>;

export const MaskFault = z.object({ line: z.int(), found: z.string(), message: z.string() });

const tag = 'stations';
const antennaRoute = { tag, access: 'stations.write', data: 'own', params: IdParams, response: Antenna } as const;
export const stationRoutes = {
  listStations: defineRoute({
    name: 'listStations',
    method: 'GET',
    path: '/api/stations',
    summary: "The organisation's stations; for admins all",
    tag,
    access: 'stations.read',
    data: 'own',
    query: PageQuery.extend({ state: StationState.optional() }),
    response: pageOf(Station),
  }),
  createStation: defineRoute({
    name: 'createStation',
    method: 'POST',
    path: '/api/stations',
    summary: 'Describe a station',
    tag,
    access: 'stations.write',
    data: 'own',
    body: StationInput,
    response: Station,
    status: 201,
    errors: ['already-exists'],
  }),
  getStation: defineRoute({
    name: 'getStation',
    method: 'GET',
    path: '/api/stations/:id',
    summary: 'One station',
    tag,
    access: 'stations.read',
    data: 'own',
    params: IdParams,
    response: Station,
    errors: ['not-found'],
  }),
  updateStation: defineRoute({
    name: 'updateStation',
    method: 'PUT',
    path: '/api/stations/:id',
    summary: 'Change a station; moving an approved one sends it back to approval',
    tag,
    access: 'stations.write',
    data: 'own',
    params: IdParams,
    body: StationInput,
    response: Station,
    errors: ['not-found', 'already-exists', 'wrong-state'],
  }),
  submitStation: defineRoute({
    name: 'submitStation',
    method: 'POST',
    path: '/api/stations/:id/submit',
    summary: 'Ask for approval',
    tag,
    access: 'stations.write',
    data: 'own',
    params: IdParams,
    response: Station,
    errors: ['not-found', 'wrong-state'],
  }),
  decideStation: defineRoute({
    name: 'decideStation',
    method: 'POST',
    path: '/api/stations/:id/decide',
    summary: 'Approve, refuse or suspend a station',
    tag,
    access: 'stations.approve',
    data: 'all',
    params: IdParams,
    body: z.object({
      decision: z.enum(['approve', 'refuse', 'suspend']),
      note: Note.min(1, 'Give the reason; the owner reads it.'),
    }),
    response: Station,
    errors: ['not-found', 'wrong-state'],
  }),
  createAntenna: defineRoute({
    name: 'createAntenna',
    method: 'POST',
    path: '/api/stations/:id/antennas',
    summary: 'Add an antenna to a station',
    tag,
    access: 'stations.write',
    data: 'own',
    params: IdParams,
    body: AntennaInput,
    response: Antenna,
    status: 201,
    errors: ['not-found', 'already-exists'],
  }),
  getAntenna: defineRoute({
    ...antennaRoute,
    name: 'getAntenna',
    method: 'GET',
    path: '/api/antennas/:id',
    summary: 'One antenna with mask, bands, availability and price',
    access: 'stations.read',
    errors: ['not-found'],
  }),
  updateAntenna: defineRoute({
    ...antennaRoute,
    name: 'updateAntenna',
    method: 'PUT',
    path: '/api/antennas/:id',
    summary: 'Change size, mount, limits and booking rules',
    body: AntennaInput,
    errors: ['not-found', 'already-exists'],
  }),
  setBands: defineRoute({
    ...antennaRoute,
    name: 'setBands',
    method: 'PUT',
    path: '/api/antennas/:id/bands',
    summary: 'Replace the bands',
    body: z.object({ bands: z.array(AntennaBandInput).max(40) }),
    errors: ['not-found'],
  }),
  setMask: defineRoute({
    ...antennaRoute,
    name: 'setMask',
    method: 'PUT',
    path: '/api/antennas/:id/mask',
    summary: 'Publish a horizon mask; the old one stays in the history',
    body: z.object({ points: MaskPoints, reason: z.string().trim().max(200).default('') }),
    errors: ['not-found', 'bad-input'],
  }),
  readMaskCsv: defineRoute({
    name: 'readMaskCsv',
    method: 'POST',
    path: '/api/masks/read',
    summary: 'Read a mask from CSV text without saving',
    tag,
    access: 'stations.write',
    data: 'none',
    body: z.object({ text: z.string().min(1, 'The file is empty.').max(200_000, 'A mask file is at most 200 kB.') }),
    response: z.object({ points: z.array(z.tuple([z.number(), z.number()])), faults: z.array(MaskFault) }),
    idempotencyKey: 'none',
  }),
  setAvailability: defineRoute({
    ...antennaRoute,
    name: 'setAvailability',
    method: 'PUT',
    path: '/api/antennas/:id/availability',
    summary: "Replace the weekly opening hours, in the station's own time zone",
    body: z.object({ rules: z.array(WeeklyRule).max(50) }),
    errors: ['not-found', 'bad-input'],
  }),
  setPrice: defineRoute({
    ...antennaRoute,
    name: 'setPrice',
    method: 'PUT',
    path: '/api/antennas/:id/price',
    summary: 'Publish a price card; quotes already given keep theirs',
    body: PriceCardInput.extend({
      validFromUtc: UtcTime.optional().describe('a time to come; now where it is absent'),
    }),
    errors: ['not-found', 'bad-input'],
  }),
  addBlackout: defineRoute({
    name: 'addBlackout',
    method: 'POST',
    path: '/api/antennas/:id/blackouts',
    summary: 'Block out time; sold contacts stay',
    tag,
    access: 'stations.write',
    data: 'own',
    params: IdParams,
    body: BlackoutInput,
    response: z.object({
      blackout: Blackout,
      touches: z.array(z.object({ bookingId: Id, number: z.int(), aosUtc: UtcTime })),
    }),
    status: 201,
    errors: ['not-found'],
  }),
  removeBlackout: defineRoute({
    name: 'removeBlackout',
    method: 'DELETE',
    path: '/api/blackouts/:id',
    summary: 'Open blocked time again',
    tag,
    access: 'stations.write',
    data: 'own',
    params: IdParams,
    response: Done,
    errors: ['not-found'],
  }),
  putOnSale: defineRoute({
    ...antennaRoute,
    name: 'putOnSale',
    method: 'POST',
    path: '/api/antennas/:id/sale',
    summary: 'Put an antenna on sale or pause it',
    body: z.object({ onSale: z.boolean() }),
    errors: ['not-found', 'wrong-state'],
  }),
} as const;
