/** Identifiers and digests. */
import { createHash, randomBytes } from 'node:crypto';
import { v7 } from 'uuid';

/** A version 7 UUID: sorts by the time it was made. */
export const newId = (): string => v7();

/** SHA-256 in hexadecimal. */
export const sha256 = (text: string): string => createHash('sha256').update(text).digest('hex');

/** 256 random bits for a link or a refresh token, URL safe. */
export const newSecret = (): string => randomBytes(32).toString('base64url');
