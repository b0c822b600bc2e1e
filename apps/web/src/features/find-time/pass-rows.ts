/** The passes as rows of a table. Pure. */
import type { FoundPass, SearchResult } from '@skyberth/shared';

export interface PassRow {
  readonly key: string;
  readonly pass: FoundPass;
  readonly aosMs: number;
  readonly lengthMs: number;
  readonly highestDeg: number;
  readonly spacecraftName: string;
  readonly antennaName: string;
  readonly stationName: string;
  /** Of the whole pass, or of its dearest part; null where nothing is for sale. */
  readonly priceMinor: number | null;
}

export const SORTS = ['aos', 'length', 'highest', 'price'] as const;
export type Sort = (typeof SORTS)[number];

export function passRows(result: SearchResult): PassRow[] {
  const places = new Map(
    result.stations.flatMap((station) =>
      station.antennas.map((antenna) => [antenna.id, { antenna: antenna.name, station: station.name }] as const),
    ),
  );
  const names = new Map(result.spacecraft.map((one) => [one.id, one.name]));
  return result.passes.map((pass) => {
    const aosMs = Date.parse(pass.geometry.aosUtc);
    const place = places.get(pass.antennaId);
    return {
      key: pass.key,
      pass,
      aosMs,
      lengthMs: Date.parse(pass.geometry.losUtc) - aosMs,
      highestDeg: pass.geometry.maxElevationDeg,
      spacecraftName: names.get(pass.spacecraftId) ?? '',
      antennaName: place?.antenna ?? '',
      stationName: place?.station ?? '',
      priceMinor: pass.parts.length > 0 ? Math.max(...pass.parts.map((one) => one.totalMinor)) : null,
    };
  });
}

/** Soonest first; longest, highest and cheapest first otherwise. What has no price stands last. */
export function sortRows(rows: readonly PassRow[], sort: Sort): PassRow[] {
  const by: Record<Sort, (row: PassRow) => number> = {
    aos: (row) => row.aosMs,
    length: (row) => -row.lengthMs,
    highest: (row) => -row.highestDeg,
    price: (row) => row.priceMinor ?? Number.POSITIVE_INFINITY,
  };
  return rows.toSorted((a, b) => order(by[sort](a), by[sort](b)) || a.aosMs - b.aosMs);
}

// Two infinities have no difference.
const order = (a: number, b: number): number => (a === b ? 0 : a - b);

const DAY_MS = 86_400_000;

/** Rows by UTC day, both ascending. */
export function rowsByDay(rows: readonly PassRow[]): { dayMs: number; rows: PassRow[] }[] {
  const days = new Map<number, PassRow[]>();
  for (const row of sortRows(rows, 'aos')) {
    const dayMs = Math.floor(row.aosMs / DAY_MS) * DAY_MS;
    days.set(dayMs, [...(days.get(dayMs) ?? []), row]);
  }
  return [...days].map(([dayMs, some]) => ({ dayMs, rows: some }));
}

/** WGS84 equatorial radius; a footprint on a small map needs no ellipsoid. */
const EARTH_RADIUS_EQUATORIAL_KM = 6378.137;

/**
 * Angle at the Earth's centre, in degrees, between a station and the point below a spacecraft that it sees at
 * `elevationDeg` and `rangeKm`: the triangle of centre, station and spacecraft.
 */
export function centralAngleDeg(elevationDeg: number, rangeKm: number): number {
  const elevationRad = (elevationDeg * Math.PI) / 180;
  const across = rangeKm * Math.cos(elevationRad);
  const up = EARTH_RADIUS_EQUATORIAL_KM + rangeKm * Math.sin(elevationRad);
  return (Math.atan2(across, up) * 180) / Math.PI;
}

/** How far from a station its passes of this search reach, in degrees; null without a pass. */
export function reachDeg(passes: readonly FoundPass[], antennaIds: readonly string[]): number | null {
  const angles = passes
    .filter((one) => antennaIds.includes(one.antennaId))
    .flatMap(({ geometry: { elevationDeg, rangeKm } }) => [
      centralAngleDeg(elevationDeg[0], rangeKm[0]),
      centralAngleDeg(elevationDeg[2], rangeKm[2]),
    ]);
  return angles.length > 0 ? Math.max(...angles) : null;
}
