/** The codes that an authenticator with a demo person's secret would show (RFC 6238, as the server asks for them). */
import { generateSync } from 'otplib';

export const codeAt = (secret: string, timeMs: number): string =>
  generateSync({ secret, epoch: Math.floor(timeMs / 1000) });
