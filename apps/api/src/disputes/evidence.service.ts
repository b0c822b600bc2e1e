/** Assembles the evidence of a dispute from what the marketplace itself knows; neither side writes any of it. */
import { Inject, Injectable } from '@nestjs/common';
import { compileMask, maskElevationDeg } from '@skyberth/orbit';
import type { DisputeEvidence, PassDetail } from '@skyberth/shared';
import type { BookingRow } from '../bookings/bookings.repository.js';
import { DriftGeometry } from '../drift/drift-geometry.js';
import { MarketService } from '../market/market.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { ElementsService, type KeptElements } from '../spacecraft/elements.service.js';
import { DisputeRepository } from './disputes.repository.js';
import { findingsOf } from './findings.js';

const HOUR_MS = 3_600_000;
/** Elements of this long after the contact still know more about it than older ones. Common practice, no source. */
const LATER_WITHIN_MS = 12 * HOUR_MS;

/** A receiver takes some seconds to lock; less is no gap. Common practice, no source. */
const LEAST_GAP_MS = 10_000;

export interface Gap {
  readonly fromMs: number;
  readonly toMs: number;
  readonly from: string;
}

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

@Injectable()
export class EvidenceService {
  constructor(
    private readonly repository: DisputeRepository,
    private readonly market: MarketService,
    private readonly drift: DriftGeometry,
    private readonly elements: ElementsService,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  async assemble(booking: BookingRow, claimed: Gap | null): Promise<DisputeEvidence> {
    const detail = await this.market.geometryOf(booking);
    const sold = this.elements.byId(booking.elementSetId);
    const station = this.stationLog(booking);
    const gap = claimed ?? gapOf(booking, station);
    const track = this.track(booking, detail);
    const later = sold && (await this.later(booking, sold));
    const predicted = detail.links.flatMap(({ direction, volumeBits }) =>
      direction === 'downlink' && volumeBits !== null ? [volumeBits / 8] : [],
    );
    const found = {
      aosUtc: utc(booking.aosMs),
      losUtc: utc(booking.losMs),
      track,
      gap: gap && { fromUtc: utc(gap.fromMs), toUtc: utc(gap.toMs), from: gap.from },
      later,
      sunClosestDeg: detail.sun.closestDeg,
      station: station.map(({ atMs, kind, words }) => ({ atUtc: utc(atMs), kind, words })),
      predictedBytes: predicted.length === 0 ? null : predicted.reduce((sum, bytes) => sum + bytes, 0),
      reportedBytes: this.reportedBytes(booking),
    };
    return {
      ...found,
      assembledUtc: utc(this.clock.nowMs()),
      elements: { epochUtc: detail.elements.epochUtc, ageH: detail.elements.ageH },
      mails: this.repository.mailsAbout(booking.id).map(({ atMs, subject }) => ({ atUtc: utc(atMs), subject })),
      findings: findingsOf({
        ...found,
        guardS: Math.round((booking.aosMs - booking.guardFromMs) / 1000),
        sunKeepOffDeg: detail.sun.keepOffDeg,
        reported: booking.report && { outcome: booking.report.outcome, cause: booking.report.cause },
      }),
    };
  }

  private track(booking: BookingRow, detail: PassDetail): DisputeEvidence['track'] {
    const mask = this.repository.maskAt(booking.antennaId, booking.aosMs) ?? detail.antenna.mask;
    const horizon = compileMask(mask);
    const downlink = detail.links.find(({ direction, marginDb }) => direction === 'downlink' && marginDb.length > 0);
    return detail.track.map(({ timeUtc, azimuthDeg, elevationDeg }, index) => ({
      timeUtc,
      azimuthDeg,
      elevationDeg,
      maskDeg: maskElevationDeg(horizon, azimuthDeg),
      marginDb: downlink?.marginDb[index] ?? null,
    }));
  }

  /** The contact by the best elements known by now, where those are others than it was sold on. */
  private async later(booking: BookingRow, sold: KeptElements): Promise<DisputeEvidence['later']> {
    const untilMs = Math.min(this.clock.nowMs(), booking.tcaMs + LATER_WITHIN_MS);
    const best = this.elements.inForce(booking.spacecraftId, untilMs);
    if (!best || best.id === sold.id) return null;
    const carried = await this.drift.carry(booking, sold, best);
    if (carried === null)
      return { epochUtc: best.epochUtc, aosUtc: null, losUtc: null, aosShiftS: null, losShiftS: null };
    return {
      epochUtc: best.epochUtc,
      aosUtc: utc(carried.aosMs),
      losUtc: utc(carried.losMs),
      aosShiftS: (carried.aosMs - booking.aosMs) / 1000,
      losShiftS: (carried.losMs - booking.losMs) / 1000,
    };
  }

  private stationLog(booking: BookingRow): LogLine[] {
    const live = this.repository
      .liveReports(booking.id)
      .map(({ happenedMs, kind, sentence }) => ({ atMs: happenedMs, kind, words: sentence }));
    const { report } = booking;
    if (!report) return live;
    const reported: LogLine[] = [];
    const has = (kind: string) => live.some((line) => line.kind === kind);
    if (report.acquiredUtc && !has('acquired'))
      reported.push({ atMs: Date.parse(report.acquiredUtc), kind: 'acquired', words: 'Acquired, by the report.' });
    if (report.lostUtc && !has('lost'))
      reported.push({ atMs: Date.parse(report.lostUtc), kind: 'lost', words: 'Lost, by the report.' });
    if (report.note) reported.push({ atMs: booking.losMs, kind: 'note', words: `Report: ${report.note}` });
    return [...live, ...reported].sort((a, b) => a.atMs - b.atMs);
  }

  private reportedBytes(booking: BookingRow): number | null {
    if (booking.report?.receivedBytes != null) return booking.report.receivedBytes;
    const counts = this.repository.liveReports(booking.id).filter(({ kind }) => kind === 'bytes');
    return counts.at(-1)?.value ?? null;
  }
}

interface LogLine {
  readonly atMs: number;
  readonly kind: string;
  readonly words: string;
}

/** The time without signal by the station's own log: from a loss to the next acquisition, or to LOS. */
export function gapOf(booking: { aosMs: number; losMs: number }, log: readonly LogLine[]): Gap | null {
  const from = 'the station’s log';
  const marks = log.filter(({ kind }) => kind === 'acquired' || kind === 'lost');
  const first = marks.find(({ kind }) => kind === 'acquired');
  if (!first) return null;
  const gaps: Gap[] = first.atMs > booking.aosMs ? [{ fromMs: booking.aosMs, toMs: first.atMs, from }] : [];
  marks.forEach((mark, index) => {
    if (mark.kind !== 'lost' || mark.atMs >= booking.losMs) return;
    const again = marks.slice(index + 1).find(({ kind }) => kind === 'acquired');
    const toMs = Math.min(again?.atMs ?? booking.losMs, booking.losMs);
    if (toMs > mark.atMs) gaps.push({ fromMs: mark.atMs, toMs, from });
  });
  const longest = gaps
    .filter(({ fromMs, toMs }) => toMs - fromMs >= LEAST_GAP_MS)
    .toSorted((a, b) => b.toMs - b.fromMs - (a.toMs - a.fromMs))[0];
  return longest ?? null;
}
