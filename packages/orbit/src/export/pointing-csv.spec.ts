import { describe, expect, it } from 'vitest';
import { csvLine } from './csv.js';
import { parsePointingCsv, pointingCsv, pointingRows } from './pointing-csv.js';

const track = Array.from({ length: 20 }, (_, index) => ({
  timeMs: Date.UTC(2026, 11, 1, 11, 32) + index * 10_000 + 250,
  azimuthDeg: (355.123456 + index * 1.234567) % 360,
  elevationDeg: 5.5 + index,
  rangeKm: 2069.107123 - index * 33.3,
  rangeRateKmPerS: -7.009581234 + index * 0.7,
}));

describe('the pointing table', () => {
  const rows = pointingRows(track, { downlinkHz: 8.2e9, uplinkHz: 2.05e9 });

  it('comes back as it was written, to its printed digits', () => {
    const read = parsePointingCsv(pointingCsv(rows))!;
    expect(read).toHaveLength(20);
    read.forEach((row, index) => {
      const made = rows[index]!;
      expect(row.timeMs).toBe(made.timeMs);
      expect(Math.abs(row.azimuthDeg - made.azimuthDeg)).toBeLessThan(5.1e-7);
      expect(Math.abs(row.rangeKm - made.rangeKm)).toBeLessThan(5.1e-7);
      expect(Math.abs(row.downlinkHz! - made.downlinkHz!)).toBeLessThan(5.1e-4);
      expect(Math.abs(row.uplinkHz! - made.uplinkHz!)).toBeLessThan(5.1e-4);
    });
    expect(pointingCsv(read)).toBe(pointingCsv(rows));
  });

  it('listens above and sends below the carrier while the spacecraft comes nearer', () => {
    expect(rows[0]!.downlinkHz!).toBeGreaterThan(8.2e9);
    expect(rows[0]!.uplinkHz!).toBeLessThan(2.05e9);
  });

  it('leaves the frequency empty where there is no link, and carries its cautions', () => {
    const text = pointingCsv(pointingRows(track, {}));
    expect(parsePointingCsv(text)![0]!.downlinkHz).toBeUndefined();
    expect(text).toContain('# A dish following this table moves without warning.');
  });

  it('refuses a table of another kind', () => {
    expect(parsePointingCsv('a,b\r\n1,2\r\n')).toBeUndefined();
    expect(parsePointingCsv(`${pointingCsv(rows)}2026-12-01T00:00:00Z,1,2\r\n`)).toBeUndefined();
  });
});

describe('a line of a comma table', () => {
  it('quotes what needs it and disarms what a spreadsheet would run', () => {
    expect(csvLine(['a"b', 'c,d', '-7.5', '=1+1'])).toBe('"a""b","c,d",-7.5,\'=1+1\r\n');
  });
});
