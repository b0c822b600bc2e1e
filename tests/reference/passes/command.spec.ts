import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, it } from 'vitest';
import { type ExpectedPass, readExpected, readScenario, scenarioPath } from './read-scenario.js';

const script = fileURLToPath(new URL('../../../infra/run/passes.mjs', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'skyberth-passes-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

function passes(...args: string[]) {
  return spawnSync(process.execPath, [script, ...args], { encoding: 'utf8', maxBuffer: 64_000_000 });
}

function withScenario(name: string, scenario: unknown): string {
  const path = join(folder, name);
  writeFileSync(path, typeof scenario === 'string' ? scenario : JSON.stringify(scenario));
  return path;
}

describe('npm run passes', () => {
  const path = fileURLToPath(scenarioPath);

  it('prints the 826 expected passes in order, to the millisecond or the next (Skyfield 1.45)', () => {
    const { status, stdout } = passes('--scenario', path);
    expect(status).toBe(0);
    const found: readonly ExpectedPass[] = JSON.parse(stdout).passes;
    const expected = readExpected();
    const keyOf = ({ satelliteId, stationId }: ExpectedPass) => `${satelliteId} ${stationId}`;
    expect(found.map(keyOf)).toEqual(expected.map(keyOf));
    found.forEach((pass, index) => {
      const wanted = expected[index]!;
      expect(Math.abs(Date.parse(pass.aosUtc) - Date.parse(wanted.aosUtc))).toBeLessThanOrEqual(1);
      expect(Math.abs(Date.parse(pass.losUtc) - Date.parse(wanted.losUtc))).toBeLessThanOrEqual(1);
      expect(pass.clippedStart).toBe(wanted.clippedStart);
      expect(pass.clippedEnd).toBe(wanted.clippedEnd);
    });
  });

  it('prints the same for any number of threads', () => {
    const [one, two, three] = ['1', '2', '3'].map((threads) => passes('--scenario', path, '--threads', threads).stdout);
    expect(two).toBe(one);
    expect(three).toBe(one);
  });

  it('counts them with --summary', () => {
    const { status, stdout } = passes('--scenario', path, '--summary', '--threads', '2');
    expect(status).toBe(0);
    expect(JSON.parse(stdout)).toEqual({
      passes: 826,
      computeMs: expect.any(Number),
      peakRssMb: expect.any(Number),
      threads: 2,
    });
  });

  it('takes OMM in place of two lines and finds the same passes', () => {
    const scenario = readScenario();
    const [satellite] = scenario.satellites;
    const omm = {
      OBJECT_NAME: satellite!.name,
      OBJECT_ID: '2026-900A',
      EPOCH: '2026-11-30T06:00:00.000000',
      MEAN_MOTION: 15.15323725,
      ECCENTRICITY: 0.0012,
      INCLINATION: 97.48,
      RA_OF_ASC_NODE: 12,
      ARG_OF_PERICENTER: 80,
      MEAN_ANOMALY: 10,
      NORAD_CAT_ID: 81001,
      BSTAR: 0.00004,
    };
    const run = (entry: object) =>
      passes('--scenario', withScenario('one.json', { ...scenario, satellites: [entry] })).stdout;
    const fromOmm = run({ id: '81001', omm });
    expect(JSON.parse(fromOmm).passes.length).toBeGreaterThan(50);
    expect(fromOmm).toBe(run(satellite!));
  });

  it.each([
    ['a broken file', '{', /well-formed JSON/],
    ['a wrong period', { ...readScenario(), to: '2026-11-01T00:00:00Z' }, /not after its start/],
    ['a local time', { ...readScenario(), from: '2026-12-01 00:00' }, /"from" is/],
    [
      'a wrong checksum',
      withFirstTle(([one, two]) => [one!.replace(/.$/, '1'), two!]),
      /Satellite 81001: Line 1, checksum/,
    ],
    ['no satellites', { ...readScenario(), satellites: [] }, /"satellites" must be/],
    [
      'a place beyond the pole',
      { ...readScenario(), stations: [{ id: 'x', latitudeDeg: 90.1, longitudeDeg: 0, altitudeM: 0, mask: [[0, 5]] }] },
      /latitude is 90.1/,
    ],
    [
      'an empty mask',
      { ...readScenario(), stations: [{ id: 'x', latitudeDeg: 9, longitudeDeg: 0, altitudeM: 0, mask: [] }] },
      /at least one point/,
    ],
  ])('refuses %s with a sentence, status 2 and an empty stdout', (_, scenario, sentence) => {
    const { status, stdout, stderr } = passes('--scenario', withScenario('bad.json', scenario));
    expect(status).toBe(2);
    expect(stdout).toBe('');
    expect(stderr).toMatch(sentence);
    for (const line of stderr.trim().split('\n')) expect(line).toMatch(/\.$/);
  });

  it('refuses a missing file and an odd number of threads', () => {
    expect(passes('--scenario', join(folder, 'nowhere.json')).status).toBe(2);
    expect(passes('--scenario', path, '--threads', 'many')).toMatchObject({ status: 2, stdout: '' });
    expect(passes()).toMatchObject({ status: 2, stdout: '' });
  });

  it('goes on with the others when one spacecraft decays inside the period', () => {
    // GOCE, whose elements end on 2013-11-13 (Skyfield documentation, "Detecting Propagation Errors").
    const goce = [
      '1 34602U 09013A   13314.96046236  .14220718  20669-5  50412-4 0   930',
      '2 34602 096.5717 344.5256 0009826 296.2811 064.0942 16.58673376272979',
    ];
    const { stations, satellites } = readScenario();
    const scenario = {
      from: '2013-11-11T00:00:00Z',
      to: '2013-11-18T00:00:00Z',
      satellites: [{ id: 'goce', tle: goce }, satellites[7]],
      stations: stations.slice(0, 3),
    };
    const { status, stdout, stderr } = passes('--scenario', withScenario('decay.json', scenario));
    expect(status).toBe(0);
    expect(stderr).toMatch(/^Satellite goce: .*decayed.*\.\n$/);
    const found: readonly ExpectedPass[] = JSON.parse(stdout).passes;
    const ofGoce = found.filter(({ satelliteId }) => satelliteId === 'goce');
    expect(ofGoce.length).toBeGreaterThan(10);
    for (const { losUtc } of ofGoce) expect(losUtc < '2013-11-13T00:00:00Z').toBe(true);
    expect(found.length).toBeGreaterThan(ofGoce.length);
  });
});

function withFirstTle(change: (tle: readonly string[]) => readonly string[]) {
  const scenario = readScenario();
  const [first, ...others] = scenario.satellites;
  return { ...scenario, satellites: [{ ...first!, tle: change(first!.tle) }, ...others] };
}
