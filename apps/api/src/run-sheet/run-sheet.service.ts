/** The run sheet of a station: what it does now, next and later. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { Principal, QueryOf, ResponseOf, RunSheet, routes, SheetContact } from '@skyberth/shared';
import { LiveRepository } from '../live/live.repository.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { write } from '../platform/transaction.js';
import { DishRepository } from './dish.repository.js';
import { type AntennaRow, RunSheetRepository, type SheetRow } from './run-sheet.repository.js';
import { conflictsOf, type Slew, slewBetween } from './slews.js';

const HOUR_MS = 3_600_000;
/** The contact before the first on the sheet says where the dish stands. */
const BEFORE_MS = 12 * HOUR_MS;

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

@Injectable()
export class RunSheetService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly repository: RunSheetRepository,
    private readonly dishes: DishRepository,
    private readonly live: LiveRepository,
  ) {}

  /** Throws `not-found` for a station of others, and where the owner has none. */
  sheet(caller: Principal, query: QueryOf<typeof routes.runSheet>): RunSheet {
    const stations = this.repository.stations(caller.organisationId);
    const station = query.stationId ? stations.find((each) => each.id === query.stationId) : stations[0];
    if (!station) throw notFound('station');
    const nowMs = this.clock.nowMs();
    const antennas = this.repository.antennas(station.id);
    const ids = antennas.map((antenna) => antenna.id);
    const untilMs = nowMs + query.hours * HOUR_MS;
    const rows = this.repository.contacts(ids, nowMs - BEFORE_MS, untilMs);
    const slews = slewsOf(antennas, rows);
    const shown = rows.filter(({ booking }) => booking.guardToMs > nowMs || booking.state === 'under way');
    const reports = this.live.reportsOf(shown.map(({ booking }) => booking.id));
    return {
      asOfUtc: utc(nowMs),
      station: { id: station.id, name: station.name, timeZone: station.timeZone },
      stations: stations.map(({ id, name }) => ({ id, name })),
      antennas: this.antennaViews(antennas),
      contacts: shown.map((row) => ({
        ...contactView(row),
        slew: slews.get(row.booking.id) ?? null,
        reported: reportedOf(reports.filter((report) => report.bookingId === row.booking.id)),
      })),
      conflicts: this.conflicts(antennas, shown, { slews, nowMs, untilMs }),
      notes: this.repository
        .notes(station.id)
        .map(({ writtenMs, ...note }) => ({ ...note, writtenUtc: utc(writtenMs) })),
    };
  }

  /** Throws `not-found` for a station of others. */
  writeHandOver(caller: Principal, stationId: string, text: string): ResponseOf<typeof routes.writeHandOver> {
    const note = { id: newId(), stationId, text, writtenMs: this.clock.nowMs(), writtenBy: caller.personId };
    write(this.db, (tx) => {
      if (!this.repository.station(tx, caller.organisationId, stationId)) throw notFound('station');
      this.repository.addNote(tx, note);
    });
    const byName = this.repository.personName(caller.personId);
    return { id: note.id, text, writtenUtc: utc(note.writtenMs), byName };
  }

  private antennaViews(antennas: readonly AntennaRow[]): RunSheet['antennas'] {
    const ids = antennas.map((antenna) => antenna.id);
    const [visits, stops] = [this.dishes.visits(ids), this.dishes.stops(ids)];
    return antennas.map(({ id, name, slewAzimuthDegPerS, slewElevationDegPerS }) => {
      const stop = stops.find((each) => each.antennaId === id);
      return {
        id,
        name,
        slewAzimuthDegPerS,
        slewElevationDegPerS,
        visits: visits
          .filter((visit) => visit.antennaId === id)
          .map((visit) => ({ id: visit.id, name: visit.name, cameUtc: utc(visit.cameMs) })),
        stop: stop ? { reason: stop.reason, sinceUtc: utc(stop.stoppedMs), byName: stop.byName } : null,
      };
    });
  }

  private conflicts(
    antennas: readonly AntennaRow[],
    rows: readonly SheetRow[],
    { slews, nowMs, untilMs }: { slews: ReadonlyMap<string, Slew>; nowMs: number; untilMs: number },
  ): RunSheet['conflicts'] {
    const ids = antennas.map((antenna) => antenna.id);
    const closed = this.repository.blackouts(ids, nowMs, untilMs);
    const stops = new Map(ids.map((id) => [id, this.dishes.stopOf(this.db, id)]));
    const names = new Map(antennas.map((antenna) => [antenna.id, antenna.name]));
    return rows
      .filter(({ booking }) => booking.state === 'confirmed' || booking.state === 'under way')
      .flatMap(({ booking }) =>
        conflictsOf(booking, {
          slew: slews.get(booking.id) ?? null,
          closed: closed.filter((each) => each.antennaId === booking.antennaId),
          stop: stops.get(booking.antennaId) ?? null,
          nowMs,
          antennaName: names.get(booking.antennaId) ?? '',
        }),
      );
  }
}

/** By booking, from the contact before on the same beam. */
function slewsOf(antennas: readonly AntennaRow[], rows: readonly SheetRow[]): Map<string, Slew> {
  const slews = new Map<string, Slew>();
  const last = new Map<string, SheetRow>();
  for (const row of rows) {
    const { antennaId, beam, id } = row.booking;
    const antenna = antennas.find((each) => each.id === antennaId);
    const before = last.get(`${antennaId} ${beam}`);
    if (antenna && before) slews.set(id, slewBetween(antenna, before.booking, row.booking));
    last.set(`${antennaId} ${beam}`, row);
  }
  return slews;
}

function contactView({ booking, spacecraftName, operatorName }: SheetRow): Omit<SheetContact, 'slew' | 'reported'> {
  const { pass } = booking;
  return {
    bookingId: booking.id,
    number: booking.number,
    antennaId: booking.antennaId,
    beam: booking.beam,
    state: booking.state,
    spacecraftName,
    operatorName,
    need: booking.need,
    setupStartsUtc: utc(booking.guardFromMs),
    aosUtc: utc(booking.aosMs),
    tcaUtc: utc(booking.tcaMs),
    losUtc: utc(booking.losMs),
    teardownEndsUtc: utc(booking.guardToMs),
    answerByUtc: booking.answerByMs === null ? null : utc(booking.answerByMs),
    maxElevationDeg: pass.maxElevationDeg,
    aosAzimuthDeg: pass.azimuthDeg[0],
    losAzimuthDeg: pass.azimuthDeg[2],
  };
}

type Report = ReturnType<LiveRepository['reportsOf']>[number];

/** The newest of each kind. */
function reportedOf(reports: readonly Report[]): SheetContact['reported'] {
  const newest = (kind: Report['kind']) => reports.findLast((report) => report.kind === kind);
  const at = (report: Report | undefined) => (report ? utc(report.happenedMs) : null);
  const bytes = newest('bytes');
  return {
    acquiredUtc: at(newest('acquired')),
    lostUtc: at(newest('lost')),
    bytes: bytes?.value ?? null,
    bytesUtc: at(bytes),
    ebN0Db: newest('eb/n0')?.value ?? null,
    note: newest('note')?.sentence ?? null,
  };
}
