import { Logger } from '@nestjs/common';
import { migrateDatabase, openDatabase, outbox, type SkyberthDatabase } from '@skyberth/drizzle';
import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { JobsService } from '../jobs/jobs.service.js';
import { AdjustableClock } from '../platform/clock.js';
import type { Config } from '../platform/config.js';
import { write } from '../platform/transaction.js';
import { MOST_ATTEMPTS, waitAfterMs } from './back-off.js';
import { OutboxRepository } from './outbox.repository.js';
import { OutboxRunner } from './outbox.runner.js';
import { OutboxService } from './outbox.service.js';
import { PermanentFailure } from './permanent-failure.js';

let db: SkyberthDatabase;
let clock: AdjustableClock;

const runnerOn = (database: SkyberthDatabase) => {
  const rows = new OutboxRepository(database);
  const jobs = new JobsService({ jobs: false } as Config, clock);
  return { runner: new OutboxRunner(rows, jobs, clock), service: new OutboxService(rows, clock), rows };
};
const stored = () => db.select().from(outbox).all();

beforeAll(() => Logger.overrideLogger(false));
beforeEach(() => {
  db = openDatabase(':memory:');
  migrateDatabase(db);
  clock = new AdjustableClock();
});

describe('the outbox', () => {
  it('keeps nothing of a change that was rolled back', () => {
    const { service } = runnerOn(db);
    expect(() =>
      write(db, (tx) => {
        service.enqueue(tx, { kind: 'k', dedupeKey: '1', payload: {} });
        throw new Error('refused');
      }),
    ).toThrow('refused');
    expect(stored()).toEqual([]);
  });

  it('does a cause once, also when it is written twice', async () => {
    const { service, runner } = runnerOn(db);
    const seen: unknown[] = [];
    runner.register('k', async (payload) => void seen.push(payload));
    for (const n of [1, 2]) write(db, (tx) => service.enqueue(tx, { kind: 'k', dedupeKey: 'same', payload: n }));
    await runner.drain();
    write(db, (tx) => service.enqueue(tx, { kind: 'k', dedupeKey: 'same', payload: 3 }));
    await runner.drain();
    expect(seen).toEqual([1]);
  });

  it('waits until the time has come', async () => {
    const { service, runner } = runnerOn(db);
    const seen: unknown[] = [];
    runner.register('k', async (payload) => void seen.push(payload));
    const notBeforeMs = clock.nowMs() + 60_000;
    write(db, (tx) => service.enqueue(tx, { kind: 'k', dedupeKey: '1', payload: 'later', notBeforeMs }));
    await runner.drain();
    expect(seen).toEqual([]);
    clock.advance(61_000);
    await runner.drain();
    expect(seen).toEqual(['later']);
  });

  it('tries again with longer waits, and gives up after twelve attempts', async () => {
    const { service, runner, rows } = runnerOn(db);
    const attempts: number[] = [];
    runner.register('k', async (_payload, { attempt }) => {
      attempts.push(attempt);
      throw new Error('no answer');
    });
    write(db, (tx) => service.enqueue(tx, { kind: 'k', dedupeKey: '1', payload: {} }));
    for (let n = 1; n <= MOST_ATTEMPTS + 3; n += 1) {
      await runner.drain();
      clock.advance(waitAfterMs(n) + 1);
    }
    expect(attempts).toEqual(Array.from({ length: MOST_ATTEMPTS }, (_, index) => index + 1));
    expect(stored()[0]).toMatchObject({ state: 'failed', lastError: 'no answer' });
    expect(rows.summary()).toMatchObject({ pending: 0, failed: 1 });
  });

  it('does not try again what can never succeed', async () => {
    const { service, runner } = runnerOn(db);
    runner.register('k', async () => {
      throw new PermanentFailure('no such mailbox');
    });
    write(db, (tx) => service.enqueue(tx, { kind: 'k', dedupeKey: '1', payload: {} }));
    await runner.drain();
    expect(stored()[0]).toMatchObject({ state: 'failed', attempts: 1 });
  });

  it('is carried out by one of two runners at a time, and by the other when the first one died', async () => {
    const first = runnerOn(db);
    const second = runnerOn(db);
    const seen: string[] = [];
    let letGo = () => {};
    first.runner.register('k', () => new Promise((resolve) => (letGo = resolve)));
    second.runner.register('k', async () => void seen.push('second'));
    write(db, (tx) => first.service.enqueue(tx, { kind: 'k', dedupeKey: '1', payload: {} }));
    const running = first.runner.drain();
    await second.runner.drain();
    expect(seen).toEqual([]);
    clock.advance(61_000);
    await second.runner.drain();
    expect(seen).toEqual(['second']);
    letGo();
    await running;
    expect(stored()[0]).toMatchObject({ state: 'done', attempts: 2 });
  });

  it('forgets what a handler wants forgotten', async () => {
    const { service, runner } = runnerOn(db);
    runner.register('k', async () => {}, { keepWhenDone: () => ({ to: 'a' }) });
    write(db, (tx) => service.enqueue(tx, { kind: 'k', dedupeKey: '1', payload: { to: 'a', text: 'secret' } }));
    await runner.drain();
    expect(stored()[0]?.payload).toBe('{"to":"a"}');
  });

  it('does not let one kind wait for another', async () => {
    const { service, runner } = runnerOn(db);
    const seen: string[] = [];
    let letGo = () => {};
    runner.register('slow', () => new Promise((resolve) => (letGo = resolve)));
    runner.register('quick', async (payload) => void seen.push(String(payload)));
    write(db, (tx) => {
      service.enqueue(tx, { kind: 'slow', dedupeKey: 's', payload: {} });
      service.enqueue(tx, { kind: 'quick', dedupeKey: 'q1', payload: 'q1' });
      service.enqueue(tx, { kind: 'quick', dedupeKey: 'q2', payload: 'q2' });
    });
    const running = runner.drain();
    await new Promise((resolve) => setImmediate(resolve));
    expect(seen).toEqual(['q1', 'q2']);
    letGo();
    await running;
  });
});
