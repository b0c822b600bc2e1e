import { mkdtempSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { json2satrec, type OMMJsonObject, twoline2satrec } from 'satellite.js';
import { describe, expect, it, onTestFinished } from 'vitest';
import { start } from './index.js';
import { tleLines } from './tle.js';

const LANTERN = {
  OBJECT_NAME: 'LANTERN-1',
  OBJECT_ID: '2026-007A',
  EPOCH: '2026-11-30T18:21:09.123456',
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
};
const BEACON = {
  ...LANTERN,
  OBJECT_NAME: 'BEACON-2',
  NORAD_CAT_ID: 148_493,
  BSTAR: -0.0000034,
  MEAN_MOTION_DOT: 0.00002182,
};

async function bench(elements: object = [LANTERN, BEACON]) {
  const dataDir = mkdtempSync(join(tmpdir(), 'skyberth-elements-'));
  const file = join(dataDir, 'elements.json');
  writeFileSync(file, JSON.stringify(elements));
  const service = await start({ port: 0, dataDir });
  onTestFinished(async () => {
    await service.close();
    rmSync(dataDir, { recursive: true, force: true });
  });
  const fault = (body: object) =>
    fetch(`${service.url}/_test/fault`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify(body),
    });
  return {
    file,
    fault,
    url: service.url,
    omm: `${service.url}/elements/omm.json`,
    tle: `${service.url}/elements/tle.txt`,
  };
}

describe('the two-line form', () => {
  // Columns: published-values section b. The library that reads both forms was written by others.
  it('is read by an independent library as the same orbit as the OMM', () => {
    for (const omm of [LANTERN, BEACON]) {
      const [, line1, line2] = tleLines(omm);
      expect([line1.length, line2.length]).toEqual([69, 69]);
      const [fromLines, fromOmm] = [twoline2satrec(line1, line2), json2satrec(omm as unknown as OMMJsonObject)];
      for (const key of ['inclo', 'nodeo', 'ecco', 'argpo', 'mo', 'no', 'bstar', 'ndot'] as const)
        expect(fromLines[key]).toBeCloseTo(fromOmm[key], 10);
      // Eight decimals of a day are 0.9 ms, and the library reads an OMM's epoch to the millisecond.
      expect(Math.abs(fromLines.jdsatepoch - fromOmm.jdsatepoch) * 86_400).toBeLessThan(0.002);
    }
  });

  // Alpha-5 of 148493 is E8493: published-values, what the libraries do.
  it('writes numbers past 99999 in alpha-5', () => {
    expect(tleLines(BEACON)[1].slice(2, 7)).toBe('E8493');
    expect(() => tleLines({ ...LANTERN, NORAD_CAT_ID: 340_000 })).toThrow('340000');
  });

  // From memory of the column description: digits count themselves, a minus one, all else nothing.
  it('ends in the check digit', () => {
    const [, line1] = tleLines(LANTERN);
    let sum = 0;
    for (const letter of line1.slice(0, 68))
      sum += letter >= '0' && letter <= '9' ? Number(letter) : letter === '-' ? 1 : 0;
    expect(line1.at(-1)).toBe(String(sum % 10));
  });
});

describe('the feed', () => {
  it('serves both forms, all of them or one', async () => {
    const { omm, tle } = await bench();
    expect(await (await fetch(omm)).json()).toEqual([LANTERN, BEACON]);
    expect(await (await fetch(`${omm}?catalog=98765`)).json()).toEqual([LANTERN]);
    expect((await (await fetch(tle)).text()).split('\n')).toHaveLength(7);
  });

  // RFC 9110 section 13.2.2.
  it('answers 304 to what the caller has, until the file changes', async () => {
    const { omm, file } = await bench();
    const first = await fetch(omm);
    const [etag, modified] = [first.headers.get('etag') ?? '', first.headers.get('last-modified') ?? ''];
    const ask = async (headers: Record<string, string>) => (await fetch(omm, { headers })).status;
    expect(await ask({ 'if-none-match': etag })).toBe(304);
    expect(await ask({ 'if-none-match': `"other", W/${etag}` })).toBe(304);
    expect(await ask({ 'if-modified-since': modified })).toBe(304);
    expect(await ask({ 'if-none-match': '"other"', 'if-modified-since': modified })).toBe(200);
    writeFileSync(file, JSON.stringify([LANTERN]));
    utimesSync(file, new Date(), new Date(Date.now() + 10_000));
    expect(await ask({ 'if-none-match': etag })).toBe(200);
    expect(await ask({ 'if-modified-since': modified })).toBe(200);
  });

  it('says that it is down when its file is broken', async () => {
    const { url } = await bench({ nothing: true });
    expect((await fetch(`${url}/health`)).status).toBe(503);
  });

  it('fails on demand, for as long as asked', async () => {
    const { omm, fault } = await bench();
    await fault({ mode: 'error', status: 503, times: 1 });
    expect([(await fetch(omm)).status, (await fetch(omm)).status]).toEqual([503, 200]);
    await fault({ mode: 'cut', times: 1 });
    await expect(fetch(omm).then((response) => response.text())).rejects.toThrow();
    expect((await fault({ mode: 'error', times: -1 })).status).toBe(400);
    expect((await fault({ mode: 'nonsense' })).status).toBe(400);
  });

  it('can be late or wrong in the ways that feeds are', async () => {
    const { omm, tle, fault } = await bench([LANTERN]);
    await fault({ mode: 'stale', staleDays: 10, times: 1 });
    expect(await (await fetch(omm)).json()).toMatchObject([{ EPOCH: '2026-11-20T18:21:09.123' }]);
    const poisoned = async (address: string, poison: string): Promise<string> => {
      await fault({ mode: 'poisoned', poison, times: 1 });
      return (await fetch(address)).text();
    };
    expect(await poisoned(omm, 'web_page')).toContain('<!doctype html>');
    const broken = await poisoned(omm, 'truncated');
    expect(() => JSON.parse(broken)).toThrow();
    expect(JSON.parse(await poisoned(omm, 'impossible'))).toMatchObject([{ ECCENTRICITY: 1.5 }]);
    expect(JSON.parse(await poisoned(omm, 'moved'))).toMatchObject([{ MEAN_ANOMALY: 279.75 }]);
    const [good, bad] = [await (await fetch(tle)).text(), await poisoned(tle, 'bad_check_digit')];
    expect(bad).not.toBe(good);
    expect(bad.split('\n')[1]?.slice(0, 68)).toBe(good.split('\n')[1]?.slice(0, 68));
    expect(await poisoned(tle, 'impossible')).toContain('2 98765 999.9999');
  });
});
