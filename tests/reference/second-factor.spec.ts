/** The codes of the second factor against RFC 6238, Appendix B (data/security/rfc6238-totp-vectors.json, its source inside). */
import { readFileSync } from 'node:fs';
import { generateSync, verifySync } from 'otplib';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';

const Published = z.object({
  secretBase32Sha1: z.string(),
  vectors: z.array(z.object({ unixSeconds: z.int(), algorithm: z.string(), digits6: z.string() })),
});
const file = readFileSync(new URL('data/security/rfc6238-totp-vectors.json', import.meta.url), 'utf8');
const { secretBase32Sha1: secret, vectors } = Published.parse(JSON.parse(file));
const sha1 = vectors.filter((vector) => vector.algorithm === 'SHA1');

describe('codes of the second factor', () => {
  it('are those of the six published vectors with SHA-1', () => {
    expect(sha1).toHaveLength(6);
    for (const { unixSeconds, digits6 } of sha1) {
      expect([unixSeconds, generateSync({ secret, epoch: unixSeconds })]).toEqual([unixSeconds, digits6]);
    }
  });

  it('are taken a step late (section 5.2), not two, and not again after their own step', () => {
    for (const { unixSeconds: epoch, digits6: token } of sha1) {
      const check = (lateS: number, afterTimeStep?: number) =>
        verifySync({
          secret,
          token,
          epoch: epoch + lateS,
          epochTolerance: 30,
          ...(afterTimeStep === undefined ? {} : { afterTimeStep }),
        }).valid;
      expect([check(0), check(30), check(60)]).toEqual([true, true, false]);
      expect(check(0, Math.floor(epoch / 30))).toBe(false);
    }
  });
});
