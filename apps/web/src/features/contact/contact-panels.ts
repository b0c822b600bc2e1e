/** The curves of a contact over one time axis. Pure. */
import type { Booking, PassDetail } from '@skyberth/shared';
import { maskElevationAt } from '../../drawing/common/rose.js';
import type { ContactCurvesProps, CurvePanel, CurvePhase } from '../../drawing/curves/curves-types.js';
import { formatDegrees, formatNumber, formatTime } from '../../ui/format.js';
import { liveAt, type TrackInstant, trackOf, valueAt } from './contact-live.js';

const STEP_MS = 5_000;
/** Under this margin frames may be lost; common practice, no source. */
const THIN_MARGIN_DB = 2;
const BESIDE_MS = 45_000;

type Times = Pick<Booking, 'setupStartsUtc' | 'teardownEndsUtc' | 'aosUtc' | 'losUtc'>;
export type ContactChart = Omit<ContactCurvesProps, 'nowMs'>;

/** Everything that does not change each second; the readings are in `readingsAt`. */
export function contactChart(label: string, booking: Times, detail: PassDetail): ContactChart {
  const [aosMs, losMs] = [Date.parse(booking.aosUtc), Date.parse(booking.losUtc)];
  const setupMs = Date.parse(booking.setupStartsUtc);
  const teardownMs = Date.parse(booking.teardownEndsUtc);
  const [fromMs, toMs] = [setupMs - BESIDE_MS, teardownMs + BESIDE_MS];
  const track = trackOf(detail);
  const axis = { fromMs, toMs, track };
  return {
    label,
    fromMs,
    toMs,
    aosMs,
    losMs,
    phases: phases({ aosMs, losMs, setupMs, teardownMs }),
    panels: [elevationPanel(axis, detail), ...detail.links.flatMap((link) => linkPanels(axis, link))],
  };
}

function phases(at: { aosMs: number; losMs: number; setupMs: number; teardownMs: number }): CurvePhase[] {
  const all: CurvePhase[] = [
    { kind: 'guard', label: 'Set-up', fromMs: at.setupMs, toMs: at.aosMs },
    { kind: 'contact', label: 'Contact', fromMs: at.aosMs, toMs: at.losMs },
    { kind: 'guard', label: 'Tear-down', fromMs: at.losMs, toMs: at.teardownMs },
  ];
  return all.filter((phase) => phase.toMs > phase.fromMs);
}

interface Axis {
  readonly fromMs: number;
  readonly toMs: number;
  readonly track: readonly TrackInstant[];
}

function sample({ fromMs, toMs }: Axis, valueAtMs: (atMs: number) => number): Float32Array {
  const count = Math.max(2, Math.ceil((toMs - fromMs) / STEP_MS) + 1);
  return Float32Array.from({ length: count }, (_, index) =>
    valueAtMs(fromMs + (index / (count - 1)) * (toMs - fromMs)),
  );
}

function elevationPanel(axis: Axis, detail: PassDetail): CurvePanel {
  const mask = detail.antenna.mask.map(([azimuthDeg, elevationDeg]) => ({ azimuthDeg, elevationDeg }));
  return {
    id: 'elevation',
    title: 'Elevation',
    note: 'degrees, over the antenna’s own horizon',
    unit: '°',
    values: sample(axis, (atMs) => liveAt(axis.track, atMs)?.elevationDeg ?? Number.NaN),
    land: sample(axis, (atMs) => {
      const at = liveAt(axis.track, atMs);
      return at ? maskElevationAt(mask, at.azimuthDeg) : Number.NaN;
    }),
    filled: true,
    minValue: 0,
    heightPx: 150,
  };
}

function linkPanels(axis: Axis, link: PassDetail['links'][number]): CurvePanel[] {
  const id = `${link.radioName} ${link.direction}`;
  const arrow = link.direction === 'downlink' ? 'down' : 'up';
  const panels: CurvePanel[] = [];
  if (link.dopplerHz.length > 0)
    panels.push({
      id: `${id} doppler`,
      title: 'Doppler',
      note: `kHz at ${formatNumber(link.frequencyMhz, 1)} MHz ${arrow}`,
      unit: 'kHz',
      values: sample(axis, (atMs) => valueAt(axis.track, link.dopplerHz, atMs) / 1000),
      heightPx: 86,
    });
  if (link.marginDb.length > 0)
    panels.push({
      id: `${id} margin`,
      title: 'Link margin',
      note: `dB left over, ${link.band} ${link.direction}`,
      unit: 'dB',
      values: sample(axis, (atMs) => valueAt(axis.track, link.marginDb, atMs)),
      minValue: Math.min(0, ...link.marginDb.filter(Number.isFinite).map(Math.floor)),
      floor: { value: THIN_MARGIN_DB, text: `below ${THIN_MARGIN_DB} dB, frames may be lost` },
      heightPx: 92,
    });
  return panels;
}

/** Present values in words, by panel id; the range of the contact where there is no present value. */
export function readingsAt(detail: PassDetail, nowMs: number): Readonly<Record<string, string>> {
  const track = trackOf(detail);
  const live = liveAt(track, nowMs);
  const highest = `${formatDegrees(detail.geometry.maxElevationDeg)} at ${formatTime(Date.parse(detail.geometry.tcaUtc))}`;
  const readings: Record<string, string> = {
    elevation: live ? `${formatDegrees(live.elevationDeg)} now, ${highest}` : `highest ${highest}`,
  };
  for (const link of detail.links) {
    const id = `${link.radioName} ${link.direction}`;
    readings[`${id} doppler`] = dopplerReading(link, valueAt(track, link.dopplerHz, nowMs));
    readings[`${id} margin`] = marginReading(link, valueAt(track, link.marginDb, nowMs));
  }
  return readings;
}

const HZ_PER_MHZ = 1e6;

function dopplerReading(link: PassDetail['links'][number], nowHz: number): string {
  if (!Number.isFinite(nowHz)) return '';
  const sign = nowHz > 0 ? '+' : '';
  const now = `${sign}${formatNumber(nowHz / 1000, 1)} kHz now`;
  if (link.direction !== 'downlink') return now;
  return `${now}, set receiver to ${(link.frequencyMhz + nowHz / HZ_PER_MHZ).toFixed(4)} MHz`;
}

function marginReading(link: PassDetail['links'][number], nowDb: number): string {
  const finite = link.marginDb.filter(Number.isFinite);
  if (finite.length === 0) return '';
  const least = `least ${formatNumber(Math.min(...finite), 1)} dB`;
  return Number.isFinite(nowDb) ? `${formatNumber(nowDb, 1)} dB now, ${least}` : least;
}
