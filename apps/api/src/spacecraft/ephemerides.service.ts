/** Operators' own ephemerides: kept as given, used inside their spans, withdrawn when they are wrong. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase, StoredSegment } from '@skyberth/drizzle';
import type { BodyOf, EphemerisSummary, Principal, ResponseOf, routes } from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId, sha256 } from '../platform/ids.js';
import { write } from '../platform/transaction.js';
import { uniqueOr } from '../platform/unique-name.js';
import { WeightedCache } from '../platform/weighted-cache.js';
import { EphemeridesRepository, type EphemerisHead, type NamedEphemeris } from './ephemerides.repository.js';
import type { EphemerisContent } from './ephemeris-file.js';
import { ELEMENT_READER, type ElementReader } from './reader/element-reader.js';
import { SpacecraftRepository, type SpacecraftRow } from './spacecraft.repository.js';

/** An ephemeris ready for the pass engine; the numbers lie in shared memory, so that threads need no copy. */
export interface KeptEphemeris {
  readonly id: string;
  readonly source: string;
  readonly addedMs: number;
  readonly startMs: number;
  readonly stopMs: number;
  readonly segments: readonly StoredSegment[];
  readonly states: Float64Array;
}

/** Bytes of states kept in memory. */
const MAX_BYTES = 200_000_000;
const FAULTS_IN_REFUSAL = 100;

@Injectable()
export class EphemeridesService {
  private readonly loaded = new WeightedCache<Float64Array>(MAX_BYTES);

  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(ELEMENT_READER) private readonly reader: ElementReader,
    private readonly ephemerides: EphemeridesRepository,
    private readonly spacecraft: SpacecraftRepository,
    private readonly audit: AuditService,
  ) {}

  /** Throws `not-found`. */
  list(caller: Principal, spacecraftId: string): ResponseOf<typeof routes.listEphemerides> {
    this.craft(caller, spacecraftId);
    return { items: this.ephemerides.list(spacecraftId).map(summary) };
  }

  /** Those in use that touch the period; at each instant the last that reaches it answers. */
  inUse(spacecraftId: string, fromMs: number, toMs: number): KeptEphemeris[] {
    return this.ephemerides.inUse(spacecraftId, fromMs, toMs).map((head) => ({
      id: head.id,
      source: head.source,
      addedMs: head.addedMs,
      startMs: head.startMs,
      stopMs: head.stopMs,
      segments: head.segments,
      states: this.states(head),
    }));
  }

  /**
   * Throws `not-found`; `elements-unusable` with each fault's line; `bad-input` for a file of another object;
   * `already-exists` for one that is in use already.
   */
  async add(
    caller: Principal,
    spacecraftId: string,
    { text, fileName }: BodyOf<typeof routes.addEphemeris>,
  ): Promise<EphemerisSummary> {
    this.craft(caller, spacecraftId);
    const reading = await this.reader.readEphemeris(text);
    const name = fileName ?? 'the pasted text';
    if (reading.kind === 'bad') throw unusable(name, reading.faults);
    const { content } = reading;
    return write(this.db, (tx) => {
      const craft = this.craft(caller, spacecraftId);
      sameObject(craft, content, name);
      const { states, ...head } = content;
      const row = {
        id: newId(),
        spacecraftId,
        ...head,
        startMs: Math.ceil(content.startMs),
        stopMs: Math.floor(content.stopMs),
        states: Buffer.from(states.buffer, states.byteOffset, states.byteLength),
        text,
        digest: sha256(text),
        source: fileName === null ? 'pasted' : `file ${fileName}`,
        addedBy: caller.personId,
        addedMs: this.clock.nowMs(),
        withdrawnBy: null,
        withdrawnMs: null,
      };
      uniqueOr(new DomainError('already-exists', `${craft.name} uses this very ephemeris already.`), () =>
        this.ephemerides.add(tx, row),
      );
      this.audit.record(tx, {
        caller,
        action: 'ephemeris.add',
        subject: `spacecraft:${spacecraftId}`,
        data: { ephemeris: row.id, source: row.source, states: row.stateCount },
      });
      return summary(this.kept(tx, spacecraftId, row.id));
    });
  }

  /** Throws `not-found`, or `wrong-state` where it is withdrawn already. */
  withdraw(caller: Principal, spacecraftId: string, id: string): EphemerisSummary {
    return write(this.db, (tx) => {
      this.craft(caller, spacecraftId);
      const row = this.kept(tx, spacecraftId, id);
      if (row.withdrawnMs !== null) throw new DomainError('wrong-state', 'This ephemeris is withdrawn already.');
      this.ephemerides.withdraw(tx, id, caller.personId, this.clock.nowMs());
      this.audit.record(tx, {
        caller,
        action: 'ephemeris.withdraw',
        subject: `spacecraft:${spacecraftId}`,
        data: { ephemeris: id },
      });
      return summary(this.kept(tx, spacecraftId, id));
    });
  }

  private craft(caller: Principal, id: string): SpacecraftRow {
    const row = this.spacecraft.find(this.db, caller.organisationId, id);
    if (!row) throw notFound('spacecraft');
    return row;
  }

  private kept(...[db, spacecraftId, id]: Parameters<EphemeridesRepository['find']>): NamedEphemeris {
    const row = this.ephemerides.find(db, spacecraftId, id);
    if (!row) throw notFound('ephemeris');
    return row;
  }

  private states({ id }: EphemerisHead): Float64Array {
    const known = this.loaded.get(id);
    if (known !== undefined) return known;
    const bytes = this.ephemerides.states(id);
    if (bytes === undefined) throw new Error(`Ephemeris ${id} has lost its states.`);
    const memory = new SharedArrayBuffer(bytes.byteLength);
    new Uint8Array(memory).set(bytes);
    const states = new Float64Array(memory);
    this.loaded.set(id, states, memory.byteLength);
    return states;
  }
}

function sameObject(craft: SpacecraftRow, { objectId, objectName }: EphemerisContent, name: string): void {
  const own = craft.internationalDesignator;
  if (own === null || own.toUpperCase() === objectId.toUpperCase()) return;
  const detail = `${name} is about ${objectName}, OBJECT_ID ${objectId}; ${craft.name} is ${own}. Nothing was saved.`;
  throw new DomainError('bad-input', detail, [{ pointer: '/text', detail }]);
}

function unusable(name: string, faults: readonly { line: number; message: string }[]): DomainError {
  const fields = faults.slice(0, FAULTS_IN_REFUSAL).map(({ line, message }) => ({
    pointer: '/text',
    detail: message.startsWith('Line ') ? message : `Line ${line}: ${message}`,
  }));
  const count = faults.length === 1 ? 'One thing is' : `${faults.length} things are`;
  const detail = `${count} wrong in ${name}: ${fields[0]?.detail ?? ''} Nothing was saved, since an ephemeris with a damaged line is not to be flown by.`;
  return new DomainError('elements-unusable', detail, fields);
}

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

function summary(row: NamedEphemeris): EphemerisSummary {
  const { id, startMs, stopMs, segments, stateCount, objectName, objectId, originator, source } = row;
  return {
    id,
    startUtc: utc(startMs),
    stopUtc: utc(stopMs),
    segments: segments.length,
    states: stateCount,
    frame: [...new Set(segments.map((segment) => segment.frameName))].join(', '),
    interpolation: [...new Set(segments.map(interpolationWords))].join(', '),
    objectName,
    objectId,
    originator,
    source,
    addedByName: row.addedByName,
    addedUtc: utc(row.addedMs),
    withdrawnByName: row.withdrawnByName,
    withdrawnUtc: row.withdrawnMs === null ? null : utc(row.withdrawnMs),
  };
}

function interpolationWords({ interpolation, interpolationDegree }: StoredSegment): string {
  if (interpolation === null) return 'Lagrange, degree 7 (the file names none)';
  const method = interpolation.charAt(0) + interpolation.slice(1).toLowerCase();
  return interpolationDegree === null ? method : `${method}, degree ${interpolationDegree}`;
}
