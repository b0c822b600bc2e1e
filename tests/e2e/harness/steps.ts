/** Names the step in which a long walk broke, and keeps a picture of the page as it was then. */

import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Desk } from './browser.js';

export async function step<T>(name: string, desk: Pick<Desk, 'page'>, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const picture = join(tmpdir(), `skyberth-${name.replaceAll(/[^a-z0-9]+/gi, '-')}.png`);
    await desk.page.screenshot({ path: picture }).catch(() => undefined);
    const said = error instanceof Error ? error.message : String(error);
    throw new Error(`While ${name}, at ${desk.page.url()} (picture: ${picture}): ${said}`, { cause: error });
  }
}
