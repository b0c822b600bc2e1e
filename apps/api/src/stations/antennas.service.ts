/** Describing an antenna: its limits, bands, horizon, hours, price, and whether it is on sale. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { parseMaskCsv, validateMask } from '@skyberth/orbit';
import type { Antenna, BodyOf, Principal, ResponseOf, routes } from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { nameTaken, uniqueOr } from '../platform/unique-name.js';
import { AntennasRepository, type WholeAntenna } from './antennas.repository.js';
import { refuseBadPrice, refuseBadRules, refuseBadValidFrom } from './input-checks.js';
import { antennaView, blackoutView, missingOf } from './station-views.js';
import { StationsRepository } from './stations.repository.js';
import { scopeOf } from './stations.service.js';

/** Blackouts are shown from a week ago to as far ahead as anything can be booked. */
const SHOWN_BEFORE_MS = 7 * 86_400_000;
const SHOWN_AFTER_MS = 400 * 86_400_000;

@Injectable()
export class AntennasService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly stations: StationsRepository,
    private readonly antennas: AntennasRepository,
    private readonly audit: AuditService,
  ) {}

  get(caller: Principal, id: string): Antenna {
    return antennaView(this.find(this.db, caller, id));
  }

  /** Throws `not-found` for the station, `already-exists` for the name. */
  create(caller: Principal, stationId: string, input: BodyOf<typeof routes.createAntenna>): Antenna {
    return write(this.db, (tx) => {
      if (!this.stations.find(tx, scopeOf(caller), stationId)) throw notFound('station');
      const id = newId();
      const createdMs = this.clock.nowMs();
      const antenna = { ...input, id, stationId, state: 'draft' as const, version: 1, createdMs };
      uniqueOr(nameTaken('antenna', input.name), () => this.antennas.add(tx, antenna));
      this.note(tx, caller, 'antenna.create', id, { stationId, ...input });
      return antennaView(this.find(tx, caller, id));
    });
  }

  update(caller: Principal, id: string, input: BodyOf<typeof routes.updateAntenna>): Antenna {
    return this.change(caller, id, 'antenna.update', input, (tx, { antenna }) => {
      const values = { ...input, version: antenna.version + 1 };
      uniqueOr(nameTaken('antenna', input.name), () => this.antennas.change(tx, id, values));
    });
  }

  setBands(caller: Principal, id: string, { bands }: BodyOf<typeof routes.setBands>): Antenna {
    return this.change(caller, id, 'antenna.set-bands', { bands }, (tx, { antenna }) => {
      this.antennas.replaceBands(tx, id, bands);
      this.antennas.change(tx, id, { version: antenna.version + 1 });
    });
  }

  /** Throws `bad-input` with a sentence for each thing that is wrong with the mask. */
  setMask(caller: Principal, id: string, { points, reason }: BodyOf<typeof routes.setMask>): Antenna {
    const faults = validateMask(points);
    if (faults.length > 0) {
      const fields = faults.map((detail) => ({ pointer: '/points', detail }));
      throw new DomainError('bad-input', faults.join(' '), fields);
    }
    return this.change(caller, id, 'antenna.set-mask', { points, reason }, (tx, { antenna }) => {
      const publishedMs = this.clock.nowMs();
      this.antennas.addMask(tx, {
        id: newId(),
        antennaId: id,
        points,
        reason,
        publishedBy: caller.personId,
        publishedMs,
      });
      this.antennas.change(tx, id, { version: antenna.version + 1 });
    });
  }

  readMaskCsv(text: string): ResponseOf<typeof routes.readMaskCsv> {
    const { points, faults } = parseMaskCsv(text);
    return { points: points.map(([azimuthDeg, elevationDeg]) => [azimuthDeg, elevationDeg]), faults: [...faults] };
  }

  setAvailability(caller: Principal, id: string, { rules }: BodyOf<typeof routes.setAvailability>): Antenna {
    return this.change(caller, id, 'antenna.set-availability', { rules }, (tx, { station }) => {
      refuseBadRules(rules, station.timeZone, this.clock.nowMs());
      this.antennas.replaceRules(tx, id, rules);
    });
  }

  /**
   * The card holds for purchases from now on, or from the instant it names; the ones before stay, and so do prices that
   * were frozen. Throws `bad-input` for an instant that has gone by or is more than two years away.
   */
  setPrice(caller: Principal, id: string, card: BodyOf<typeof routes.setPrice>): Antenna {
    return this.change(caller, id, 'antenna.set-price', card, (tx, { station }) => {
      refuseBadPrice(card, station.currency);
      const { perMinuteMinor, setupMinor, minimumMinor, validFromUtc, ...terms } = card;
      const nowMs = this.clock.nowMs();
      const validFromMs = validFromUtc === undefined ? nowMs : Date.parse(validFromUtc);
      refuseBadValidFrom(validFromMs, nowMs);
      const amounts = { perMinuteMinor, setupMinor, minimumMinor, currency: station.currency };
      this.antennas.addPrice(tx, {
        id: newId(),
        antennaId: id,
        ...amounts,
        terms,
        validFromMs,
        createdMs: nowMs,
      });
    });
  }

  /** Throws `wrong-state` with what the antenna still lacks. */
  putOnSale(caller: Principal, id: string, { onSale }: BodyOf<typeof routes.putOnSale>): Antenna {
    return this.change(caller, id, onSale ? 'antenna.sell' : 'antenna.pause', {}, (tx, whole) => {
      const missing = onSale ? missingOf(whole) : [];
      if (missing.length > 0) throw new DomainError('wrong-state', missing.join(' '));
      if (!onSale && whole.antenna.state === 'draft') {
        throw new DomainError('wrong-state', `${whole.antenna.name} has not been put on sale yet.`);
      }
      this.antennas.change(tx, id, { state: onSale ? 'on sale' : 'paused' });
    });
  }

  /** Sold contacts stay; the answer lists those inside the blackout. */
  addBlackout(
    caller: Principal,
    antennaId: string,
    input: BodyOf<typeof routes.addBlackout>,
  ): ResponseOf<typeof routes.addBlackout> {
    return write(this.db, (tx) => {
      this.find(tx, caller, antennaId);
      const [fromMs, toMs] = [Date.parse(input.fromUtc), Date.parse(input.toUtc)];
      const blackout = {
        id: newId(),
        antennaId,
        fromMs,
        toMs,
        reason: input.reason,
        note: input.note,
        createdBy: caller.personId,
        createdMs: this.clock.nowMs(),
      };
      this.antennas.addBlackout(tx, blackout);
      this.note(tx, caller, 'antenna.add-blackout', antennaId, { ...input });
      const touches = this.antennas.contactsIn(tx, antennaId, fromMs, toMs);
      return {
        blackout: blackoutView(blackout),
        touches: touches.map(({ bookingId, number, aosMs }) => ({
          bookingId,
          number,
          aosUtc: new Date(aosMs).toISOString(),
        })),
      };
    });
  }

  removeBlackout(caller: Principal, id: string): { ok: true } {
    return write(this.db, (tx) => {
      const blackout = this.antennas.removeBlackout(tx, caller.organisationId, id);
      if (!blackout) throw notFound('blackout');
      this.note(tx, caller, 'antenna.remove-blackout', blackout.antennaId, { id });
      return { ok: true };
    });
  }

  /** Finds, changes, notes and shows, in one transaction. */
  private change(
    caller: Principal,
    id: string,
    action: string,
    data: Readonly<Record<string, unknown>>,
    work: (tx: Db, whole: WholeAntenna) => void,
  ): Antenna {
    return write(this.db, (tx) => {
      work(tx, this.find(tx, caller, id));
      this.note(tx, caller, action, id, data);
      return antennaView(this.find(tx, caller, id));
    });
  }

  private find(db: Db, caller: Principal, id: string): WholeAntenna {
    const nowMs = this.clock.nowMs();
    const period = { fromMs: nowMs - SHOWN_BEFORE_MS, toMs: nowMs + SHOWN_AFTER_MS, nowMs };
    const whole = this.antennas.find(db, scopeOf(caller), id, period);
    if (!whole) throw notFound('antenna');
    return whole;
  }

  private note(tx: Db, caller: Principal, action: string, id: string, data: Readonly<Record<string, unknown>>): void {
    this.audit.record(tx, { caller, action, subject: `antenna:${id}`, data });
  }
}
