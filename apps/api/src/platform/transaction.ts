/** Write transactions: immediate, synchronous, short. */
import type { SkyberthDatabase } from '@skyberth/drizzle';

/** What repositories take: the database, or the transaction they are called in. */
export type Db = SkyberthDatabase | Parameters<Parameters<SkyberthDatabase['transaction']>[0]>[0];

/**
 * Runs `work` in a BEGIN IMMEDIATE transaction, so that two writers queue instead of failing half way.
 * `work` must not be asynchronous: a promise would commit before its work is done, hence the refusal.
 */
export function write<T>(db: SkyberthDatabase, work: (tx: Db) => T): T {
  return db.transaction(
    (tx) => {
      const result = work(tx);
      if (result instanceof Promise) throw new Error('A write transaction must be synchronous.');
      return result;
    },
    { behavior: 'immediate' },
  );
}

/** The message of a trigger or constraint that refused a write, or null where the error is another. */
export function refusalOf(error: unknown): string | null {
  for (let cause: unknown = error; cause instanceof Error; cause = cause.cause) {
    const code = (cause as { code?: unknown }).code;
    if (typeof code === 'string' && code.startsWith('SQLITE_CONSTRAINT')) return cause.message;
  }
  return null;
}
