/** What the station form holds while it is filled in. */
import type { Station } from '@skyberth/shared';
import type { NumberOrEmpty } from '../../lib/form-rules.js';

export interface StationValues {
  name: string;
  latitudeDeg: NumberOrEmpty;
  longitudeDeg: NumberOrEmpty;
  altitudeM: NumberOrEmpty;
  country: string;
  timeZone: string;
  currency: string;
  description: string;
  contactName: string;
  contactPhone: string;
}

export const emptyStation = (timeZone: string): StationValues => ({
  name: '',
  latitudeDeg: '',
  longitudeDeg: '',
  altitudeM: '',
  country: '',
  timeZone,
  currency: 'EUR',
  description: '',
  contactName: '',
  contactPhone: '',
});

export const stationValues = (station: Station): StationValues => ({
  name: station.name,
  latitudeDeg: station.latitudeDeg,
  longitudeDeg: station.longitudeDeg,
  altitudeM: station.altitudeM,
  country: station.country,
  timeZone: station.timeZone,
  currency: station.currency,
  description: station.description,
  contactName: station.contactName,
  contactPhone: station.contactPhone,
});

/** Whether the place differs, which sends an approved station back to approval. */
export const hasMoved = (station: Station, values: StationValues): boolean =>
  station.latitudeDeg !== values.latitudeDeg ||
  station.longitudeDeg !== values.longitudeDeg ||
  station.altitudeM !== values.altitudeM;

/** IANA zones with their present distance from UTC, for a searchable list; `chosen` is in it even as an older name. */
export function timeZoneChoices(nowMs: number, chosen: string): { value: string; label: string }[] {
  return [...new Set([chosen, 'UTC', ...Intl.supportedValuesOf('timeZone')])].map((value) => {
    const parts = new Intl.DateTimeFormat('en-GB', { timeZone: value, timeZoneName: 'longOffset' }).formatToParts(
      nowMs,
    );
    const offset = parts.find((part) => part.type === 'timeZoneName')?.value.replace('GMT', 'UTC') ?? 'UTC';
    return { value, label: `${value.replaceAll('_', ' ')}, ${offset === 'UTC' ? 'UTC' : offset.replace(/:00$/, '')}` };
  });
}

/** Currencies by code and name. */
export function currencyChoices(): { value: string; label: string }[] {
  const names = new Intl.DisplayNames('en', { type: 'currency' });
  return Intl.supportedValuesOf('currency').map((value) => ({ value, label: `${value}, ${names.of(value) ?? value}` }));
}
