import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { type RunningElements, start } from '@skyberth/elements-standin';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { must, type Person, routes, type Skyberth, startSkyberth } from './harness.js';

const HOUR_MS = 3_600_000;
let skyberth: Skyberth;
let feed: RunningElements;
let feedDir: string;
let operator: Person;
let id: string;

const omm = (epochAgoMs: number, change: object = {}) => ({
  OBJECT_NAME: 'LANTERN-1',
  OBJECT_ID: '2026-007A',
  EPOCH: new Date(skyberth.clock.nowMs() - epochAgoMs).toISOString().replace('Z', ''),
  MEAN_MOTION: 15.2191827,
  ECCENTRICITY: 0.0012345,
  INCLINATION: 97.4321,
  RA_OF_ASC_NODE: 8.0625,
  ARG_OF_PERICENTER: 120.5,
  MEAN_ANOMALY: 239.75,
  EPHEMERIS_TYPE: 0,
  CLASSIFICATION_TYPE: 'U',
  NORAD_CAT_ID: 98_765,
  ELEMENT_SET_NO: 12,
  REV_AT_EPOCH: 4321,
  BSTAR: 0.0001027,
  MEAN_MOTION_DOT: -0.00000215,
  MEAN_MOTION_DDOT: 0,
  ...change,
});
const publish = (...elements: object[]) => writeFileSync(join(feedDir, 'elements.json'), JSON.stringify(elements));
const sets = async () => {
  operator = await skyberth.people.awake(operator);
  return must(skyberth.call(routes.listElements, { params: { id }, query: {}, as: operator }));
};

beforeAll(async () => {
  feedDir = mkdtempSync(join(tmpdir(), 'skyberth-feed-'));
  feed = await start({ port: 0, dataDir: feedDir });
  skyberth = await startSkyberth({ environment: { ELEMENT_FEED_URL: `${feed.url}/elements/omm.json` } });
  operator = await skyberth.people.operator();
  const body = { name: 'Lantern 1', shortName: 'L1', catalogNumber: 98_765 };
  id = (await must(skyberth.call(routes.createSpacecraft, { body, as: operator }))).id;
});
afterAll(async () => {
  await skyberth.stop();
  await feed.close();
  rmSync(feedDir, { recursive: true, force: true });
});

describe('the element feed', () => {
  it('gives known spacecraft their sets, and adds nobody', async () => {
    publish(omm(5 * HOUR_MS), omm(4 * HOUR_MS, { OBJECT_NAME: 'BEACON-2', NORAD_CAT_ID: 98_766 }));
    await skyberth.runJobs();
    const { items } = await sets();
    expect(items).toMatchObject([
      { format: 'omm-json', addedByName: null, source: expect.stringContaining('feed') as string },
    ]);
    expect((await must(skyberth.call(routes.listSpacecraft, { query: {}, as: operator }))).total).toBe(1);
  });

  it('is asked again after a quarter of an hour, and an unchanged list changes nothing', async () => {
    publish(omm(2 * HOUR_MS));
    await skyberth.runJobs();
    expect((await sets()).total).toBe(1);
    skyberth.clock.advance(16 * 60_000);
    await skyberth.runJobs();
    expect((await sets()).total).toBe(2);
    skyberth.clock.advance(16 * 60_000);
    await skyberth.runJobs();
    expect((await sets()).total).toBe(2);
  });

  it('is not believed where it moves a spacecraft into another orbit or into the future', async () => {
    skyberth.clock.advance(16 * 60_000);
    publish(omm(HOUR_MS, { INCLINATION: 51.6 }), omm(HOUR_MS, { MEAN_MOTION: 14.1 }), omm(-72 * HOUR_MS));
    await skyberth.runJobs();
    expect((await sets()).total).toBe(2);
  });

  it('is left alone for longer after an error, and comes back', async () => {
    skyberth.clock.advance(16 * 60_000);
    publish(omm(HOUR_MS));
    const fault = { method: 'POST', headers: { 'content-type': 'application/json' } };
    await fetch(`${feed.url}/_test/fault`, {
      ...fault,
      body: JSON.stringify({ mode: 'error', status: 503, times: 1 }),
    });
    await expect(skyberth.runJobs()).rejects.toThrow('answered 503');
    skyberth.clock.advance(16 * 60_000);
    await skyberth.runJobs();
    expect((await sets()).total).toBe(2);
    skyberth.clock.advance(15 * 60_000);
    await skyberth.runJobs();
    expect((await sets()).total).toBe(3);
  });
});
