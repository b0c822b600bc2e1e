/** Health, the API's own description, and what staff watch. */
import { z } from 'zod';
import { Currency, Id, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

export const SystemView = z.object({
  version: z.string(),
  startedUtc: UtcTime,
  database: z.object({ sizeBytes: z.int(), migrations: z.int(), integrity: z.string() }),
  outbox: z.object({
    pending: z.int(),
    failed: z.int(),
    oldestPendingUtc: UtcTime.nullable(),
    recent: z.array(
      z.object({
        id: Id,
        kind: z.string(),
        state: z.string(),
        attempts: z.int(),
        createdUtc: UtcTime,
        nextAttemptUtc: UtcTime.nullable(),
        lastError: z.string().nullable(),
      }),
    ),
  }),
  providerEvents: z.object({ received: z.int(), processed: z.int() }),
  services: z.array(z.object({ name: z.string(), ok: z.boolean(), detail: z.string() })),
});
export type SystemView = z.infer<typeof SystemView>;

/** What waits for this person now: one sentence each, with the way to it. */
export const HomeView = z.object({
  waiting: z.array(
    z.object({
      kind: z.string(),
      sentence: z.string(),
      detail: z.string(),
      path: z.string(),
      urgent: z.boolean(),
      dueUtc: UtcTime.nullable(),
    }),
  ),
  counts: z.record(z.string(), z.int()).describe('numbers for the navigation, by page'),
  money: z
    .array(
      z.object({
        label: z.string(),
        note: z.string(),
        /** One a currency; nothing is converted. */
        amounts: z.array(
          z.object({ currency: Currency, amountMinor: z.int().describe('whole minor units; may be negative') }),
        ),
      }),
    )
    .describe('money at a glance; empty for those who see none'),
  firstSteps: z
    .array(z.object({ sentence: z.string(), path: z.string(), done: z.boolean() }))
    .describe('how to begin, until all of it is done'),
});
export type HomeView = z.infer<typeof HomeView>;

const tag = 'system';
export const systemRoutes = {
  health: defineRoute({
    name: 'health',
    method: 'GET',
    path: '/api/health',
    summary: 'Whether database, migrations and outside services are fine',
    tag,
    access: 'public',
    data: 'none',
    response: z.object({ status: z.literal('ok') }),
    errors: ['unavailable'],
  }),
  openapi: defineRoute({
    name: 'openapi',
    method: 'GET',
    path: '/api/openapi.json',
    summary: 'This description',
    tag,
    access: 'public',
    data: 'none',
    produces: 'application/json',
  }),
  home: defineRoute({
    name: 'home',
    method: 'GET',
    path: '/api/home',
    summary: 'What needs the caller now',
    tag,
    access: 'signed-in',
    data: 'own',
    response: HomeView,
  }),
  system: defineRoute({
    name: 'system',
    method: 'GET',
    path: '/api/system',
    summary: 'Jobs, outbox, database and services',
    tag,
    access: 'system.read',
    data: 'all',
    response: SystemView,
  }),
} as const;
