/** Bookings as lines of a table. */
import type { BookingSummary } from '@skyberth/shared';
import { type Cell, decimals } from '../platform/csv.js';

export const BOOKING_COLUMNS: readonly string[] = [
  'berth',
  'state',
  'spacecraft',
  'station',
  'antenna',
  'operator',
  'owner',
  'need',
  'aos_utc',
  'tca_utc',
  'los_utc',
  'length_s',
  'highest_elevation_deg',
  'currency',
  'price_with_vat',
];

export function bookingCells(one: BookingSummary): Cell[] {
  const lengthS = (Date.parse(one.losUtc) - Date.parse(one.aosUtc)) / 1000;
  return [
    one.number,
    one.state,
    one.spacecraftName,
    one.stationName,
    one.antennaName,
    one.operatorName,
    one.ownerName,
    one.need,
    one.aosUtc,
    one.tcaUtc,
    one.losUtc,
    lengthS.toFixed(3),
    one.maxElevationDeg.toFixed(2),
    one.currency,
    decimals(one.toPayMinor, one.currency),
  ];
}
