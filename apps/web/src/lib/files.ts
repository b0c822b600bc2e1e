/** Uploading and downloading files that are attached to something. */
import { type AttachedFile, FILE_LIMITS, routes } from '@skyberth/shared';
import { addressOf, call, ProblemError } from './api-client.js';

/** Stores one file, to be attached with what is sent next. Throws `ProblemError` with a sentence for people. */
export async function uploadFile(file: File): Promise<AttachedFile> {
  if (file.size > FILE_LIMITS.bytes) {
    throw new ProblemError(null, `${file.name} has ${(file.size / 1e6).toFixed(1)} MB; at most 10 MB are taken.`);
  }
  const body = new Uint8Array(await file.arrayBuffer());
  return await call(routes.uploadFile, { query: { name: file.name }, body });
}

/** Where a file is saved from. */
export const fileAddress = (id: string): string => addressOf(routes.downloadFile, { params: { id } });
