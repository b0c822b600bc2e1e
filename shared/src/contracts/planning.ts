/** Planning a fleet's contacts: the need, the search for the cheapest plan, its explanation, and what becomes of it. */
import { z } from 'zod';
import {
  AmountMinor,
  Currency,
  ElevationDeg,
  Id,
  IdParams,
  Money,
  Name,
  PageQuery,
  pageOf,
  UtcTime,
} from '../primitives.js';
import { defineRoute } from '../route.js';
import { Need, Profile } from './market.js';

const hours = (most: number) => z.number().positive('Give hours above zero.').max(most, `Give at most ${most} hours.`);

export const PlanCraft = z.object({
  spacecraftId: Id,
  contactsPerDay: z.int().min(0).max(40, 'A low orbit gives fewer contacts than that.').default(0),
  bytesPerDay: z.number().min(0).max(1e15, 'Give at most 1,000 TB a day.').default(0),
  deliverByH: z
    .number()
    .positive()
    .max(24)
    .nullable()
    .default(null)
    .describe("hours into each day, UTC, by which the day's volume is down"),
  longestGapH: hours(336).nullable().default(null),
  uplinkEveryH: hours(336).nullable().default(null),
  lowestElevationDeg: ElevationDeg.default(5),
  shortestS: z.int().min(0).max(86_400).default(0),
});
export type PlanCraft = z.infer<typeof PlanCraft>;

/** How costs in several currencies are compared. Nothing is ever converted in silence, and nothing is paid at these rates. */
export const PlanCurrency = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('one'), currency: Currency.describe('only stations that sell in it are used') }),
  z.object({
    kind: z.literal('rates'),
    base: Currency,
    rates: z
      .array(z.object({ currency: Currency, inBase: z.number().positive().max(1e6) }))
      .max(20)
      .describe('what one unit of each other currency counts for in the base currency'),
  }),
]);
export type PlanCurrency = z.infer<typeof PlanCurrency>;

export const PlanInput = z.object({
  name: Name,
  firstDay: z.iso.date().describe('UTC'),
  days: z.int().min(1, 'Plan at least one day.').max(14, 'Plan at most 14 days at once.'),
  craft: z.array(PlanCraft).min(1, 'Choose at least one spacecraft.').max(20, 'Plan at most 20 spacecraft at once.'),
  currency: PlanCurrency,
  budgets: z.array(Money).max(20).default([]),
  preferredStationIds: z.array(Id).max(200).default([]),
  preferencePercent: z
    .number()
    .min(0)
    .max(100)
    .default(10)
    .describe('how much cheaper a pass elsewhere must be to be taken instead of one at a preferred station'),
  bannedStationIds: z.array(Id).max(200).default([]),
});
export type PlanInput = z.infer<typeof PlanInput>;

export const PlannedPass = z.object({
  /** Stable for the same pass, part and need; what is kept in or struck out. */
  key: z.string().max(200),
  spacecraftId: Id,
  spacecraftName: z.string(),
  spacecraftShortName: z.string(),
  antennaId: Id,
  antennaName: z.string(),
  stationId: Id,
  stationName: z.string(),
  stationTimeZone: z.string(),
  need: Need,
  aosUtc: UtcTime,
  tcaUtc: UtcTime,
  losUtc: UtcTime,
  /** The whole pass, of which the contact may be a part; what `profile` runs over. */
  passAosUtc: UtcTime,
  passLosUtc: UtcTime,
  maxElevationDeg: z.number(),
  currency: Currency,
  toPayMinor: AmountMinor.describe('with VAT; 0 for a contact that was bought before'),
  bytes: z.number().describe('while the margin is above 0 dB in clear sky'),
  bookedBefore: Id.nullable().describe('the booking, where this contact was had already'),
  profile: Profile.nullable(),
});
export type PlannedPass = z.infer<typeof PlannedPass>;

export const PlanFinding = z.object({
  spacecraftId: Id.nullable(),
  kind: z.enum(['contacts', 'volume', 'gap', 'uplink', 'budget', 'station']),
  sentence: z.string(),
});
export type PlanFinding = z.infer<typeof PlanFinding>;

export const PlanOutcome = z.object({
  computedUtc: UtcTime,
  tookS: z.number(),
  status: z.enum(['met', 'partly', 'none']),
  passes: z.array(PlannedPass),
  sums: z.array(Money).describe('what the new contacts cost, with VAT'),
  figures: z.array(
    z.object({
      spacecraftId: Id,
      contacts: z.int(),
      fewestPerDay: z.int(),
      leastBytesPerDay: z.number(),
      longestGapH: z.number(),
      longestUplinkGapH: z.number(),
    }),
  ),
  baseCurrency: Currency,
  costMinor: z.int().describe('at planning rates, preferences included'),
  boundMinor: z.int().describe('no plan costs less'),
  gapPercent: z.number(),
  proven: z.boolean(),
  unmet: z.array(PlanFinding),
  binding: z.array(PlanFinding),
  lostKeys: z.array(z.string()).describe('passes that were kept in and are not for sale any more'),
  offered: z.int(),
  greedyMinor: z
    .int()
    .nullable()
    .describe('what taking the cheapest helpful pass each time would cost; null where that gets stuck'),
  /** Names the offers that the plan was made from. */
  snapshot: z.string(),
});
export type PlanOutcome = z.infer<typeof PlanOutcome>;

export const PLAN_STATES = ['draft', 'held', 'bought', 'given up'] as const;
export const PlanState = z.enum(PLAN_STATES);
export type PlanState = z.infer<typeof PlanState>;
export const PLAN_WORK = ['working', 'done', 'stopped', 'failed'] as const;
export const PlanWork = z.enum(PLAN_WORK);
export type PlanWork = z.infer<typeof PlanWork>;

export const PlanSummary = z.object({
  id: Id,
  name: z.string(),
  state: PlanState,
  work: PlanWork,
  status: PlanOutcome.shape.status.nullable(),
  firstDay: z.iso.date(),
  days: z.int(),
  spacecraft: z.int(),
  contacts: z.int(),
  sums: z.array(Money),
  changedUtc: UtcTime,
});
export type PlanSummary = z.infer<typeof PlanSummary>;

export const PlanProgress = z.object({
  stage: z.enum(['waiting', 'searching', 'spacecraft', 'fleet', 'giving way', 'explaining']),
  done: z.int(),
  of: z.int(),
  gapPercent: z.number().nullable(),
});
export type PlanProgress = z.infer<typeof PlanProgress>;

export const Plan = z.object({
  id: Id,
  state: PlanState,
  work: PlanWork,
  need: PlanInput,
  pinnedKeys: z.array(z.string()),
  struckKeys: z.array(z.string()),
  failure: z.string().nullable(),
  groupId: Id.nullable().describe('the bookings that were held together from it'),
  progress: PlanProgress.nullable(),
  outcome: PlanOutcome.nullable(),
  createdByName: z.string(),
  createdUtc: UtcTime,
  changedUtc: UtcTime,
});
export type Plan = z.infer<typeof Plan>;

const keys = z.array(z.string().max(200)).max(2_000).default([]);
const tag = 'planning';
const onePlan = { tag, access: 'plans.make', data: 'own', params: IdParams, response: Plan } as const;

export const planningRoutes = {
  listPlans: defineRoute({
    name: 'listPlans',
    method: 'GET',
    path: '/api/plans',
    summary: "The organisation's plans, newest first",
    tag,
    access: 'plans.read',
    data: 'own',
    query: PageQuery,
    response: pageOf(PlanSummary),
  }),
  createPlan: defineRoute({
    ...onePlan,
    params: undefined,
    name: 'createPlan',
    method: 'POST',
    path: '/api/plans',
    summary: 'Look for the cheapest plan that meets a need; ask for the plan again to see how far it is',
    body: PlanInput,
    status: 201,
    errors: ['bad-input', 'not-found', 'too-many'],
  }),
  getPlan: defineRoute({
    ...onePlan,
    access: 'plans.read',
    name: 'getPlan',
    method: 'GET',
    path: '/api/plans/:id',
    summary: 'One plan, with its progress while it is being made',
    errors: ['not-found'],
  }),
  replan: defineRoute({
    ...onePlan,
    name: 'replan',
    method: 'POST',
    path: '/api/plans/:id/replan',
    summary: 'Plan again: another need, or passes to keep in and to strike out',
    body: z.object({ need: PlanInput, pinnedKeys: keys, struckKeys: keys }),
    errors: ['bad-input', 'not-found', 'wrong-state', 'too-many'],
  }),
  stopPlan: defineRoute({
    ...onePlan,
    name: 'stopPlan',
    method: 'POST',
    path: '/api/plans/:id/stop',
    summary: 'Stop looking; the plan keeps what it had before',
    errors: ['not-found', 'wrong-state'],
  }),
  holdPlan: defineRoute({
    ...onePlan,
    access: 'bookings.buy',
    name: 'holdPlan',
    method: 'POST',
    path: '/api/plans/:id/hold',
    summary: 'Hold every new contact of a plan for ten minutes at the planned prices, all or none',
    body: z.object({ oldElementsAcknowledged: z.boolean().default(false) }),
    errors: ['not-found', 'wrong-state', 'group-refused', 'too-large', 'too-many'],
  }),
  giveUpPlan: defineRoute({
    ...onePlan,
    name: 'giveUpPlan',
    method: 'POST',
    path: '/api/plans/:id/give-up',
    summary: 'Put a plan away; contacts bought from it stay',
    errors: ['not-found', 'wrong-state'],
  }),
} as const;
