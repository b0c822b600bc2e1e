/** Every horizon mask that an antenna has ever had. */
import { z } from 'zod';
import { IdParams, MaskPoints, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

export const PublishedMask = z.object({
  version: z.int(),
  points: MaskPoints,
  reason: z.string(),
  publishedByName: z.string().nullable(),
  publishedUtc: UtcTime,
});
export type PublishedMask = z.infer<typeof PublishedMask>;

export const maskHistoryRoutes = {
  listMasks: defineRoute({
    name: 'listMasks',
    method: 'GET',
    path: '/api/antennas/:id/masks',
    summary: 'The newest hundred masks of an antenna, the one in force first',
    tag: 'stations',
    access: 'stations.read',
    data: 'own',
    params: IdParams,
    response: z.object({ items: z.array(PublishedMask) }),
    errors: ['not-found'],
  }),
} as const;
