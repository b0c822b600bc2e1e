/** Files that people attach to other things: papers of a clearance, plots of a report, evidence of a dispute. */
import { z } from 'zod';
import { Id, IdParams, UtcTime } from '../primitives.js';
import { defineRoute } from '../route.js';

/** What one upload, one subject and one organisation may hold. */
export const FILE_LIMITS = {
  bytes: 10_000_000,
  perSubject: 20,
  organisationBytes: 500_000_000,
  nameCharacters: 120,
} as const;

/** What is recognised by its content; everything else is refused, whatever its name says. */
export const FILE_TYPES = {
  'application/pdf': ['pdf'],
  'image/png': ['png'],
  'image/jpeg': ['jpg', 'jpeg'],
  'text/csv': ['csv'],
  'text/plain': ['txt', 'log'],
} as const;
export const FileType = z.enum(Object.keys(FILE_TYPES) as [keyof typeof FILE_TYPES, ...(keyof typeof FILE_TYPES)[]]);
export type FileType = z.infer<typeof FileType>;

/** A body of bytes. */
export const Bytes = z.custom<Uint8Array>((value) => value instanceof Uint8Array && value.byteLength > 0, {
  error: 'Send the bytes of a file that is not empty.',
});

export const AttachedFile = z.object({
  id: Id,
  name: z.string(),
  mediaType: FileType,
  bytes: z.int(),
  uploadedUtc: UtcTime,
  uploadedByName: z.string(),
});
export type AttachedFile = z.infer<typeof AttachedFile>;

/** Uploaded files by id, to be attached with the thing that is sent. */
export const FileIds = z
  .array(Id)
  .max(FILE_LIMITS.perSubject, `Attach at most ${FILE_LIMITS.perSubject} files.`)
  .refine((ids) => new Set(ids).size === ids.length, 'A file is named twice.');

const tag = 'files';
export const fileRoutes = {
  uploadFile: defineRoute({
    name: 'uploadFile',
    method: 'POST',
    path: '/api/files',
    summary: 'Store a file, to be attached within a day: PDF, PNG, JPEG, CSV or plain text, at most 10 MB',
    tag,
    access: 'files.upload',
    data: 'own',
    query: z.object({ name: z.string().min(1, 'Give the file a name.').max(400, 'That name is too long.') }),
    body: Bytes,
    consumes: 'application/octet-stream',
    response: AttachedFile,
    status: 201,
    /** A second upload of the same bytes changes nothing for anyone; what is not attached goes after a day. */
    idempotencyKey: 'none',
    errors: ['bad-input', 'file-refused', 'too-large'],
  }),
  downloadFile: defineRoute({
    name: 'downloadFile',
    method: 'GET',
    path: '/api/files/:id',
    summary: 'The bytes of a file, for its organisation and for whoever may see what it is attached to',
    tag,
    access: 'signed-in',
    data: 'parties',
    params: IdParams,
    produces: 'application/octet-stream',
    errors: ['not-found', 'unavailable'],
  }),
} as const;
