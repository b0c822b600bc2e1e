/** Spacecraft, their radios, and the element sets that say where they are. */
import { z } from 'zod';
import { Band, FrequencyMhz, Id, IdParams, Name, PageQuery, Polarisation, pageOf, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

export const RadioDirection = z.enum(['downlink', 'uplink']);
export type RadioDirection = z.infer<typeof RadioDirection>;

const radioFields = {
  name: Name,
  direction: RadioDirection,
  band: Band,
  centreFrequencyMhz: FrequencyMhz,
  bandwidthKhz: z.number().positive('A bandwidth is above zero.').max(5_000_000),
  polarisation: Polarisation,
  modulation: z.string().trim().min(1, 'Name the modulation, such as OQPSK.').max(40),
  coding: z.string().trim().min(1, 'Name the coding, such as CCSDS convolutional 1/2, or none.').max(60),
  dataRateBps: z.int().positive('A data rate is above zero.').max(20_000_000_000),
  /** Downlink: what the spacecraft radiates. Uplink: null. */
  eirpDbw: z.number().min(-60).max(80).nullable(),
  /** Downlink: needed at the demodulator. */
  requiredEbN0Db: z.number().min(-5).max(40).nullable(),
  /** Uplink: the least EIRP that the spacecraft needs to hear. */
  requiredEirpDbw: z.number().min(-30).max(100).nullable(),
  pointingLossDb: z.number().min(0).max(30).default(0),
};
export const RadioInput = z.object(radioFields);
export const Radio = z.object({ id: Id, ...radioFields });
export type Radio = z.infer<typeof Radio>;

/** `fresh`, `ageing` (warns) or `stale` (buying needs an acknowledgement); the page says the estimated error beside it. */
export const ElementFreshness = z.enum(['none', 'fresh', 'ageing', 'stale']);
export type ElementFreshness = z.infer<typeof ElementFreshness>;

/** The estimated errors of AOS and LOS, in seconds, from which elements are ageing and stale. Common practice, no source. */
export const FRESHNESS_FROM_S = { ageing: 1, stale: 10 } as const;

export const ElementSummary = z.object({
  id: Id,
  epochUtc: UtcTime,
  ageH: z.number().describe('hours between the epoch and now'),
  timingErrorS: z.number().describe('estimated error of AOS and LOS now, one sigma, common practice'),
  format: z.enum(['tle', 'omm-kvn', 'omm-xml', 'omm-json', 'omm-csv']),
  source: z.string().describe('pasted, uploaded with its file name, or the feed'),
  addedByName: z.string().nullable(),
  addedUtc: UtcTime,
  meanMotionRevPerDay: z.number(),
  eccentricity: z.number(),
  inclinationDeg: z.number(),
  perigeeKm: z.number().describe('height above the equatorial radius'),
  apogeeKm: z.number(),
});
export type ElementSummary = z.infer<typeof ElementSummary>;

export const Spacecraft = z.object({
  id: Id,
  name: z.string(),
  shortName: z.string(),
  catalogNumber: z.int().nullable(),
  internationalDesignator: z.string().nullable(),
  state: z.enum(['active', 'retired']),
  elements: ElementSummary.nullable(),
  freshness: ElementFreshness,
  radios: z.array(Radio),
});
export type Spacecraft = z.infer<typeof Spacecraft>;

export const SpacecraftInput = z.object({
  name: Name,
  shortName: z
    .string()
    .trim()
    .min(1, 'Give a short name for the board, such as W4.')
    .max(6, 'At most 6 characters fit on the board.'),
  catalogNumber: z.int().min(1).max(999_999_999).nullable().default(null),
  internationalDesignator: z.string().trim().max(16).nullable().default(null),
  radios: z.array(RadioInput).max(20).default([]),
});

/** One thing wrong with pasted elements, precise enough to mend the file. */
export const ElementFault = z.object({
  line: z.int().min(1),
  field: z.string(),
  found: z.string(),
  expected: z.string(),
  message: z.string(),
});
export type ElementFault = z.infer<typeof ElementFault>;

export const ReadElement = z.object({
  line: z.int().min(1),
  objectName: z.string(),
  objectId: z.string(),
  catalogNumber: z.int(),
  epochUtc: z.string(),
  ageH: z.number(),
  fate: z.enum(['new', 'new-spacecraft', 'duplicate', 'older']).describe('what saving would do with it'),
  spacecraftId: Id.nullable(),
  spacecraftName: z.string().nullable(),
});
export type ReadElement = z.infer<typeof ReadElement>;

const ElementText = z.object({
  text: z.string().min(1, 'Paste element sets or choose a file.').max(8_000_000, 'Send at most 8 MB at once.'),
  fileName: z.string().trim().max(200).nullable().default(null),
  /** Attach a single set to this spacecraft even where number or name differ. */
  spacecraftId: Id.nullable().default(null),
});

const tag = 'spacecraft';
export const spacecraftRoutes = {
  listSpacecraft: defineRoute({
    name: 'listSpacecraft',
    method: 'GET',
    path: '/api/spacecraft',
    summary: "The organisation's spacecraft",
    tag,
    access: 'spacecraft.read',
    data: 'own',
    query: PageQuery.extend({ state: z.enum(['active', 'retired', 'all']).default('active') }),
    response: pageOf(Spacecraft),
  }),
  createSpacecraft: defineRoute({
    name: 'createSpacecraft',
    method: 'POST',
    path: '/api/spacecraft',
    summary: 'Add a spacecraft',
    tag,
    access: 'spacecraft.write',
    data: 'own',
    body: SpacecraftInput,
    response: Spacecraft,
    status: 201,
    errors: ['already-exists'],
  }),
  getSpacecraft: defineRoute({
    name: 'getSpacecraft',
    method: 'GET',
    path: '/api/spacecraft/:id',
    summary: 'One spacecraft',
    tag,
    access: 'spacecraft.read',
    data: 'own',
    params: IdParams,
    response: Spacecraft,
    errors: ['not-found'],
  }),
  updateSpacecraft: defineRoute({
    name: 'updateSpacecraft',
    method: 'PUT',
    path: '/api/spacecraft/:id',
    summary: 'Change names, numbers and radios',
    tag,
    access: 'spacecraft.write',
    data: 'own',
    params: IdParams,
    body: SpacecraftInput,
    response: Spacecraft,
    errors: ['not-found', 'already-exists'],
  }),
  retireSpacecraft: defineRoute({
    name: 'retireSpacecraft',
    method: 'POST',
    path: '/api/spacecraft/:id/retire',
    summary: 'Take a spacecraft out of use; refused while it has contacts to come',
    tag,
    access: 'spacecraft.write',
    data: 'own',
    params: IdParams,
    response: Spacecraft,
    errors: ['not-found', 'wrong-state'],
  }),
  listElements: defineRoute({
    name: 'listElements',
    method: 'GET',
    path: '/api/spacecraft/:id/elements',
    summary: 'Every element set kept, newest epoch first',
    tag,
    access: 'spacecraft.read',
    data: 'own',
    params: IdParams,
    query: PageQuery,
    response: pageOf(ElementSummary),
    errors: ['not-found'],
  }),
  readElements: defineRoute({
    name: 'readElements',
    method: 'POST',
    path: '/api/elements/read',
    summary: 'Read element sets without saving: what is good, what is wrong, what saving would do',
    tag,
    access: 'spacecraft.write',
    data: 'own',
    body: ElementText,
    response: z.object({ good: z.array(ReadElement), faults: z.array(ElementFault) }),
    idempotencyKey: 'none',
    errors: ['not-found', 'too-large', 'unavailable'],
  }),
  saveElements: defineRoute({
    name: 'saveElements',
    method: 'POST',
    path: '/api/elements',
    summary: 'Save element sets; with faults in the text only if the caller agrees to keep the good ones',
    tag,
    access: 'spacecraft.write',
    data: 'own',
    body: ElementText.extend({ keepGoodOnes: z.boolean().default(false), addSpacecraft: z.boolean().default(true) }),
    response: z.object({
      saved: z.int(),
      duplicates: z.int(),
      spacecraft: z.array(z.object({ id: Id, name: z.string(), added: z.boolean() })),
      faults: z.array(ElementFault),
    }),
    status: 201,
    errors: ['not-found', 'elements-unusable', 'too-large', 'unavailable'],
  }),
} as const;
