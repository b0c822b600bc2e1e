import { createHmac } from 'node:crypto';

/** The signature header of a webhook: scheme v1, HMAC-SHA256 over "<seconds>.<body>" (published-values, section j). */
export function signatureHeader(secret: string, timestampS: number, body: string): string {
  const digest = createHmac('sha256', secret).update(`${timestampS}.${body}`, 'utf8').digest('hex');
  return `t=${timestampS},v1=${digest}`;
}
