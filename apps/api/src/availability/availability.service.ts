/** Openings, blackouts on several antennas, and the calendar that they make. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { type Interval, openIntervals, weeklyRule } from '@skyberth/market';
import type {
  AntennaCalendar,
  BlackoutEntry,
  BodyOf,
  CalendarRule,
  OpeningInput,
  Principal,
  QueryOf,
  ResponseOf,
  routes,
  WeeklyRule,
} from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { AntennasRepository, type CalendarRuleRow, type WholeAntenna } from '../stations/antennas.repository.js';
import { CalendarTimes } from '../stations/calendar-times.js';
import { scopeOf } from '../stations/stations.service.js';
import { onceInterval, refuseBadEntries } from './entries.js';

const DAY_MS = 86_400_000;
const LONGEST_CALENDAR_MS = 62 * DAY_MS;
/** Rules on one antenna, so that its calendar stays quick to work out. */
const MOST_RULES = 500;
const CONTACTS_AHEAD_MS = 400 * DAY_MS;

@Injectable()
export class AvailabilityService {
  private readonly times = new CalendarTimes();

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly antennas: AntennasRepository,
    private readonly audit: AuditService,
  ) {}

  /** Throws `bad-input` for a period that is upside down or too long. */
  calendar(caller: Principal, id: string, { fromUtc, toUtc }: QueryOf<typeof routes.antennaCalendar>): AntennaCalendar {
    const fromMs = fromUtc === undefined ? this.clock.nowMs() : Date.parse(fromUtc);
    const toMs = toUtc === undefined ? fromMs + 7 * DAY_MS : Date.parse(toUtc);
    if (!(toMs > fromMs)) throw new DomainError('bad-input', 'The period must end after it begins.');
    if (toMs - fromMs > LONGEST_CALENDAR_MS) throw new DomainError('bad-input', 'A calendar shows 62 days at most.');
    const whole = this.find(this.db, caller, id, { fromMs, toMs });
    const openings = this.times.openings(whole.calendar, fromMs, toMs);
    const repeated = this.times.blackouts(whole.calendar, fromMs, toMs);
    return {
      timeZone: whole.station.timeZone,
      open: openTimes(whole.rules, whole.station.timeZone, openings, { fromMs, toMs }).map(stretch),
      openings: openings.map((each) => ({ ...stretch(each), id: each.rule.id, note: each.rule.note })),
      blackouts: [
        ...whole.blackouts.map(({ id, reason, note, ...each }) => ({
          ...stretch(each),
          id,
          repeats: false,
          reason,
          note,
        })),
        ...repeated.map(({ rule, ...each }) => ({
          ...stretch(each),
          id: rule.id,
          repeats: true,
          reason: rule.reason,
          note: rule.note,
        })),
      ],
      rules: whole.calendar.map(ruleView),
    };
  }

  addOpening(caller: Principal, antennaId: string, input: OpeningInput): CalendarRule {
    refuseBadEntries([input], '');
    return write(this.db, (tx) => {
      const whole = this.find(tx, caller, antennaId);
      this.refuseTooMany(whole, 1);
      const rule = this.rowOf(caller, antennaId, { ...input, kind: 'opening', reason: '' });
      this.antennas.addCalendarRule(tx, rule);
      this.note(tx, caller, 'antenna.add-opening', antennaId, { ...input });
      return ruleView(rule);
    });
  }

  /** All or nothing: one antenna that is not the caller's refuses all of them. Sold contacts stay, and are listed. */
  addBlackouts(
    caller: Principal,
    { antennaIds, entries }: BodyOf<typeof routes.addBlackouts>,
  ): ResponseOf<typeof routes.addBlackouts> {
    refuseBadEntries(entries, '/entries');
    return write(this.db, (tx) => {
      const ids: string[] = [];
      const touches: ResponseOf<typeof routes.addBlackouts>['touches'] = [];
      for (const antennaId of new Set(antennaIds)) {
        const whole = this.find(tx, caller, antennaId);
        this.refuseTooMany(whole, entries.filter((entry) => entry.rrule !== null).length);
        for (const entry of entries) ids.push(this.addBlackout(tx, caller, antennaId, entry));
        touches.push(...this.touchedBy(tx, caller, antennaId, ids));
        this.note(tx, caller, 'antenna.add-blackouts', antennaId, { entries });
      }
      return { ids, touches };
    });
  }

  /** Openings and blackouts alike. Throws `not-found` where one of them is not the caller's, and leaves all of them. */
  remove(caller: Principal, ids: readonly string[]): { ok: true } {
    return write(this.db, (tx) => {
      for (const id of new Set(ids)) {
        const row =
          this.antennas.removeBlackout(tx, caller.organisationId, id) ??
          this.antennas.removeCalendarRule(tx, caller.organisationId, id);
        if (!row) throw notFound('opening or blackout');
        this.note(tx, caller, 'antenna.remove-calendar-entry', row.antennaId, { ...row });
      }
      return { ok: true };
    });
  }

  private addBlackout(tx: Db, caller: Principal, antennaId: string, entry: BlackoutEntry): string {
    if (entry.rrule !== null) {
      const rule = this.rowOf(caller, antennaId, { ...entry, kind: 'blackout' });
      this.antennas.addCalendarRule(tx, rule);
      return rule.id;
    }
    const id = newId();
    this.antennas.addBlackout(tx, {
      ...onceInterval(entry),
      id,
      antennaId,
      reason: entry.reason,
      note: entry.note,
      createdBy: caller.personId,
      createdMs: this.clock.nowMs(),
    });
    return id;
  }

  /** Contacts sold on the antenna whose guarded time lies in one of these blackouts. */
  private touchedBy(tx: Db, caller: Principal, antennaId: string, ids: readonly string[]) {
    const fromMs = this.clock.nowMs();
    const toMs = fromMs + CONTACTS_AHEAD_MS;
    const contacts = this.antennas.contactsIn(tx, antennaId, fromMs, toMs);
    if (contacts.length === 0) return [];
    const whole = this.find(tx, caller, antennaId, { fromMs, toMs });
    const chosen = new Set(ids);
    const closed: Interval[] = [
      ...whole.blackouts.filter((each) => chosen.has(each.id)),
      ...this.times.blackouts(
        whole.calendar.filter((each) => chosen.has(each.id)),
        fromMs,
        toMs,
      ),
    ];
    return contacts
      .filter((contact) => closed.some((each) => each.fromMs < contact.guardToMs && each.toMs > contact.guardFromMs))
      .map(({ bookingId, number, aosMs }) => ({ antennaId, bookingId, number, aosUtc: utc(aosMs) }));
  }

  private refuseTooMany(whole: WholeAntenna, more: number): void {
    if (whole.calendar.length + more > MOST_RULES)
      throw new DomainError(
        'bad-input',
        `${whole.antenna.name} has ${whole.calendar.length} openings and repeated blackouts; it takes ${MOST_RULES}.`,
      );
  }

  private rowOf(
    caller: Principal,
    antennaId: string,
    fields: OpeningInput & Pick<CalendarRuleRow, 'kind' | 'reason'>,
  ): CalendarRuleRow {
    return { ...fields, id: newId(), antennaId, createdBy: caller.personId, createdMs: this.clock.nowMs() };
  }

  private find(db: Db, caller: Principal, id: string, period?: Interval): WholeAntenna {
    const nowMs = this.clock.nowMs();
    const whole = this.antennas.find(db, scopeOf(caller), id, { fromMs: nowMs, toMs: nowMs, ...period, nowMs });
    if (!whole) throw notFound('antenna');
    return whole;
  }

  private note(tx: Db, caller: Principal, action: string, id: string, data: Readonly<Record<string, unknown>>): void {
    this.audit.record(tx, { caller, action, subject: `antenna:${id}`, data });
  }
}

const utc = (timeMs: number): string => new Date(timeMs).toISOString();
const stretch = ({ fromMs, toMs }: Interval) => ({ fromUtc: utc(fromMs), toUtc: utc(toMs) });

/** Weekly hours and openings together, cut to the period. */
export function openTimes(
  weekly: readonly WeeklyRule[],
  timeZone: string,
  openings: readonly Interval[],
  { fromMs, toMs }: Interval,
): Interval[] {
  // A rule that began nine days before has had every weekday once.
  const fromDate = utc(fromMs - 9 * DAY_MS).slice(0, 10);
  const rules = weekly.map((hours, index) => weeklyRule({ ...hours, id: String(index), timeZone, fromDate }));
  return openIntervals({ rules, openings, fromMs, toMs });
}

const ruleView = ({ createdBy: _by, createdMs: _ms, ...rule }: CalendarRuleRow): CalendarRule => rule;
