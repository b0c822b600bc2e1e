/** Keeps files in a folder of the data directory, which no web server reaches into. */
import { randomUUID } from 'node:crypto';
import { rmSync } from 'node:fs';
import { access, mkdir, open, readFile, rename, rm } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import type { FileStorePort } from '../../files/file-store.port.js';

const DIGEST = /^[0-9a-f]{64}$/;

export class DiskStoreAdapter implements FileStorePort {
  constructor(private readonly folder: string) {}

  async put(sha256: string, bytes: Uint8Array): Promise<void> {
    const place = this.placeOf(sha256);
    if (await exists(place)) return;
    const shelf = dirname(place);
    await mkdir(shelf, { recursive: true, mode: 0o700 });
    // Written beside its place and moved there whole, so that nobody ever reads half a file.
    const draft = join(shelf, `${randomUUID()}.part`);
    try {
      await writeThrough(draft, bytes);
      await rename(draft, place);
    } catch (error) {
      await rm(draft, { force: true });
      throw error;
    }
    await flushFolder(shelf);
  }

  async get(sha256: string): Promise<Buffer | null> {
    try {
      return await readFile(this.placeOf(sha256));
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
      throw error;
    }
  }

  remove(sha256: string): void {
    rmSync(this.placeOf(sha256), { force: true });
  }

  /** Names come from digests alone; anything else must not reach the file system. */
  private placeOf(sha256: string): string {
    if (!DIGEST.test(sha256)) throw new Error('That is no SHA-256 digest.');
    return join(this.folder, sha256.slice(0, 2), sha256);
  }
}

const exists = (path: string): Promise<boolean> =>
  access(path).then(
    () => true,
    () => false,
  );

async function writeThrough(path: string, bytes: Uint8Array): Promise<void> {
  const file = await open(path, 'wx', 0o600);
  try {
    await file.writeFile(bytes);
    await file.sync();
  } finally {
    await file.close();
  }
}

/** Without it the name may be lost with the power though the bytes are safe. */
async function flushFolder(path: string): Promise<void> {
  const folder = await open(path, 'r');
  try {
    await folder.sync();
  } finally {
    await folder.close();
  }
}
