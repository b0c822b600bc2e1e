/** The small schemas that every contract is made of. Units stand in the names; every instant is UTC. */
import { z } from 'zod';

export const Id = z.uuid().describe('UUID, version 7 where the server made it');
export type Id = z.infer<typeof Id>;

/** ISO 8601 with a Z, at most milliseconds. */
export const UtcTime = z.iso.datetime({ offset: false }).describe('ISO 8601, UTC, with a Z');
export type UtcTime = z.infer<typeof UtcTime>;

export const Name = z.string().trim().min(1, 'Give it a name.').max(120, 'Use at most 120 characters.');
export const Note = z.string().trim().max(2_000, 'Use at most 2,000 characters.');
export const Email = z.email('Give an e-mail address such as name@company.example.').trim().toLowerCase().max(254);
export const Country = z.string().regex(/^[A-Z]{2}$/, 'Use the two-letter ISO 3166 country code, such as NO.');
export const Currency = z.string().regex(/^[A-Z]{3}$/, 'Use the three-letter ISO 4217 currency code, such as EUR.');
export const AmountMinor = z
  .int()
  .min(0, 'An amount of money cannot be negative.')
  .max(99_999_999_99, 'That is more than can be handled in one amount.')
  .describe('whole minor units of the currency beside it');
export const Money = z.object({ amountMinor: AmountMinor, currency: Currency });
export type Money = z.infer<typeof Money>;

export const LatitudeDeg = z
  .number()
  .min(-90, 'Latitude lies from -90° to 90°.')
  .max(90, 'Latitude lies from -90° to 90°.');
export const LongitudeDeg = z
  .number()
  .min(-180, 'Longitude lies from -180° to 180°, east positive.')
  .max(180, 'Longitude lies from -180° to 180°, east positive.');
export const ElevationDeg = z
  .number()
  .min(-10, 'Elevation lies from -10° to 90°.')
  .max(90, 'Elevation lies from -10° to 90°.');
export const AzimuthDeg = z.number().min(0, 'Azimuth lies from 0° to 360°.').max(360, 'Azimuth lies from 0° to 360°.');
export const MaskPoints = z
  .array(z.tuple([AzimuthDeg, ElevationDeg]))
  .min(1, 'A mask needs at least one point.')
  .max(720, 'A mask takes at most 720 points.');

export const TimeZone = z
  .string()
  .refine(isTimeZone, 'That is not a time zone of the IANA database, such as Europe/Oslo.');
export const LocalTime = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$|^24:00$/, 'Use hours and minutes, such as 08:30.');

/** Whether the running engine knows the IANA zone; both browser and server ask their own database. */
function isTimeZone(value: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: value });
    return true;
  } catch {
    return false;
  }
}

export const BANDS = ['VHF', 'UHF', 'L', 'S', 'C', 'X', 'Ku', 'Ka'] as const;
export const Band = z.enum(BANDS);
export type Band = z.infer<typeof Band>;

export const POLARISATIONS = ['right', 'left', 'horizontal', 'vertical'] as const;
export const Polarisation = z.enum(POLARISATIONS);
export type Polarisation = z.infer<typeof Polarisation>;

export const FrequencyMhz = z
  .number()
  .positive('A frequency is above zero.')
  .max(60_000, 'Frequencies go up to 60,000 MHz.');

/** A page of a list; `total` counts the whole list under the same filter. */
export const pageOf = <T extends z.ZodType>(item: T) =>
  z.object({ items: z.array(item), total: z.int().min(0), page: z.int().min(1), pageSize: z.int().min(1) });
export const PageQuery = z.object({
  page: z.coerce.number().int().min(1).max(100_000).default(1),
  pageSize: z.coerce.number().int().min(1).max(200).default(50),
});
export const IdParams = z.object({ id: Id });
export const Done = z.object({ ok: z.literal(true) });
