import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { elementSetDigest } from '../../../packages/orbit/src/elements/digest.js';
import { parseElementSets } from '../../../packages/orbit/src/elements/parse-element-sets.js';
import { sgp4Source } from '../../../packages/orbit/src/elements/sgp4-source.js';
import { toOmmXml } from '../../../packages/orbit/src/export/omm-xml.js';

const expected = JSON.parse(readFileSync(new URL('../data/oem/expected-passes.json', import.meta.url), 'utf8')) as {
  satellites: { name: string; tle: [string, string] }[];
};

const head = { creationUtc: '2026-12-01T00:00:00', originator: 'HARBOUR' };

describe('element sets written as OMM in XML', () => {
  // The Skyfield documentation, "The TLE format and its rivals", beside two invented spacecraft.
  const texts = [
    ...expected.satellites.map(({ name, tle }) => [name, ...tle].join('\n')),
    [
      'STATION',
      '1 25544U 98067A   24127.82853009  .00015698  00000+0  27310-3 0  9995',
      '2 25544  51.6393 160.4574 0003580 140.6673 205.7250 15.50957674452123',
    ].join('\n'),
  ];

  it.each(texts.map((text) => [text.split('\n', 1)[0]!, text]))('come back as the same elements: %s', (_name, text) => {
    const { sets, faults } = parseElementSets(text);
    expect(faults).toEqual([]);
    const again = parseElementSets(toOmmXml(sets[0]!, head));
    expect(again.faults).toEqual([]);
    expect(again.format).toBe('omm-xml');
    expect(elementSetDigest(again.sets[0]!)).toBe(elementSetDigest(sets[0]!));
  });

  it('lead to the same place to a micrometre', () => {
    const { sets } = parseElementSets(texts[0]!);
    const again = parseElementSets(toOmmXml(sets[0]!, head));
    const [first, second] = [new Float64Array(6), new Float64Array(6)];
    const timeMs = sets[0]!.epochMs + 3 * 86_400_000;
    sgp4Source(sets[0]!).stateTeme(timeMs, first);
    sgp4Source(again.sets[0]!).stateTeme(timeMs, second);
    first.forEach((value, index) => {
      expect(Math.abs(value - second[index]!)).toBeLessThan(1e-9);
    });
  });
});
