/** Which elements are in force, and keeping new ones. */
import { Inject, Injectable } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { ElementFault, ElementReading, ElementSet } from '@skyberth/orbit';
import type { BodyOf, ElementSummary, Principal, QueryOf, ReadElement, ResponseOf, routes } from '@skyberth/shared';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { DomainError, notFound } from '../platform/domain-error.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { judge, objectKey, type ReadSet } from './element-reading.js';
import { type AddedElements, ElementsRepository, type ElementsRow } from './elements.repository.js';
import { freshnessOf } from './freshness.js';
import { freeName, nameOf, shortNameOf } from './naming.js';
import { orbitShape } from './orbit-shape.js';
import { ELEMENT_READER, type ElementReader } from './reader/element-reader.js';
import { SpacecraftRepository, type SpacecraftRow } from './spacecraft.repository.js';

/** Elements whose epoch is still to come serve passes before it no earlier than this. */
const BEFORE_EPOCH_MS = 3 * 86_400_000;
/** Faults that a refusal carries; the reading route lists all. */
const FAULTS_IN_REFUSAL = 100;
const HOUR_MS = 3_600_000;

/** An element set that is kept, ready for the engine. */
export interface KeptElements {
  readonly id: string;
  readonly spacecraftId: string;
  /** SHA-256 of the content: the same digest always gives the same passes. */
  readonly digest: string;
  /** Real number; `epochUtc` is exact. */
  readonly epochMs: number;
  readonly epochUtc: string;
  readonly elementSet: ElementSet;
}

/** Elements and the stretch of time in which they are in force. */
export interface ElementsSpan {
  readonly fromMs: number;
  readonly toMs: number;
  readonly elements: KeptElements;
}

type Text = BodyOf<typeof routes.readElements>;
type Saved = ResponseOf<typeof routes.saveElements>;

@Injectable()
export class ElementsService {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(ELEMENT_READER) private readonly reader: ElementReader,
    private readonly elements: ElementsRepository,
    private readonly spacecraft: SpacecraftRepository,
    private readonly audit: AuditService,
  ) {}

  /** One kept set by its id, whoever's it is: callers come from a booking or a spacecraft that they may see. */
  byId(id: string): KeptElements | null {
    const row = this.elements.find(id);
    return row ? kept(row) : null;
  }

  /**
   * The set to compute a pass at `atMs` with: the newest epoch not after it. Where every epoch is later, the earliest
   * one serves up to three days ahead of itself (a set published for a manoeuvre or a launch); else null.
   */
  inForce(spacecraftId: string, atMs: number): KeptElements | null {
    const row = this.rowInForce(spacecraftId, atMs);
    return row ? kept(row) : null;
  }

  /** `inForce` over `[fromMs, toMs)`, cut where it changes; stretches without elements are left out. */
  inForceOver(spacecraftId: string, fromMs: number, toMs: number): ElementsSpan[] {
    const changes = this.elements.epochsIn(spacecraftId, fromMs - BEFORE_EPOCH_MS, toMs + BEFORE_EPOCH_MS);
    const earlier = changes.map((epochMs) => epochMs - BEFORE_EPOCH_MS);
    const inside = [...changes, ...earlier].filter((atMs) => atMs > fromMs && atMs < toMs);
    const edges = [...new Set([fromMs, ...inside, toMs])].sort((a, b) => a - b);
    const spans: ElementsSpan[] = [];
    for (const [index, startMs] of edges.slice(0, -1).entries()) {
      const endMs = edges[index + 1] ?? toMs;
      const elements = this.inForce(spacecraftId, startMs);
      const last = spans.at(-1);
      if (!elements) continue;
      if (last?.elements.id === elements.id && last.toMs === startMs)
        spans[spans.length - 1] = { ...last, toMs: endMs };
      else spans.push({ fromMs: startMs, toMs: endMs, elements });
    }
    return spans;
  }

  /** The set in force now, for people. */
  summaryNow(spacecraftId: string): ElementSummary | null {
    const row = this.rowInForce(spacecraftId, this.clock.nowMs());
    return row ? this.summary(row) : null;
  }

  history(spacecraftId: string, query: QueryOf<typeof routes.listElements>): ResponseOf<typeof routes.listElements> {
    const { page, pageSize } = query;
    const { rows, total } = this.elements.history(spacecraftId, pageSize, (page - 1) * pageSize);
    return { items: rows.map((row) => this.summary(row)), total, page, pageSize };
  }

  /** Reads without saving. Throws `not-found` for a spacecraft to attach to, `bad-input` for several sets for it. */
  async read(caller: Principal, input: Text): Promise<ResponseOf<typeof routes.readElements>> {
    const { good, faults } = this.judge(this.db, caller, input, await this.reader.read(input));
    return { good: good.map((each) => this.readView(each)), faults };
  }

  /** Saves all or, with consent, the good ones. Throws `elements-unusable` with what is wrong. */
  async save(caller: Principal, input: BodyOf<typeof routes.saveElements>): Promise<Saved> {
    const reading = await this.reader.read(input);
    return write(this.db, (tx) => {
      const { good, faults } = this.judge(tx, caller, input, reading);
      const homeless = input.addSpacecraft ? [] : good.filter((each) => !each.spacecraft).map(homelessFault);
      const all = [...faults, ...homeless];
      if (good.length === homeless.length || (all.length > 0 && !input.keepGoodOnes))
        throw unusable(all, good.length - homeless.length);
      const added = input.addSpacecraft ? this.addMissing(tx, caller, good) : new Map<string, SpacecraftRow>();
      const rows = this.keep(tx, caller, good, added, sourceOf(input));
      const touched = new Map<string, { id: string; name: string; added: boolean }>();
      for (const row of added.values()) touched.set(row.id, { id: row.id, name: row.name, added: true });
      for (const { spacecraft } of good) {
        if (spacecraft) touched.set(spacecraft.id, { id: spacecraft.id, name: spacecraft.name, added: false });
      }
      const saved = rows.length;
      const duplicates = good.filter((each) => each.fate === 'duplicate').length;
      this.audit.record(tx, {
        caller,
        action: 'elements.save',
        subject: `organisation:${caller.organisationId}`,
        data: { saved, duplicates, faults: all.length, spacecraft: [...touched.keys()].slice(0, 100) },
      });
      return { saved, duplicates, spacecraft: [...touched.values()], faults: all };
    });
  }

  private rowInForce(spacecraftId: string, atMs: number): AddedElements | undefined {
    return (
      this.elements.newestUpTo(spacecraftId, atMs) ??
      this.elements.earliestAfter(spacecraftId, atMs, atMs + BEFORE_EPOCH_MS)
    );
  }

  private judge(
    db: Db,
    caller: Principal,
    input: Text,
    { sets, faults }: ElementReading,
  ): { good: ReadSet[]; faults: ElementFault[] } {
    const attachTo = input.spacecraftId ? this.spacecraft.find(db, caller.organisationId, input.spacecraftId) : null;
    if (attachTo === undefined) throw notFound('spacecraft');
    if (attachTo && new Set(sets.map(objectKey)).size > 1) {
      const detail = `The text holds sets of several objects; give only those of ${attachTo.name}.`;
      throw new DomainError('bad-input', detail, [{ pointer: '/text', detail }]);
    }
    const all = this.spacecraft.all(db, caller.organisationId);
    const { digests, newestMs } = this.elements.known(
      db,
      all.map((row) => row.id),
    );
    return { good: judge(sets, { spacecraft: all, digests, newestMs }, attachTo), faults: [...faults] };
  }

  /** One new spacecraft for each object that has none yet, by `objectKey`. */
  private addMissing(tx: Db, caller: Principal, good: readonly ReadSet[]): Map<string, SpacecraftRow> {
    const taken = new Set(this.spacecraft.all(tx, caller.organisationId).map((row) => row.name.toLowerCase()));
    const added = new Map<string, SpacecraftRow>();
    for (const { set, spacecraft } of good) {
      const key = objectKey(set);
      if (spacecraft || added.has(key)) continue;
      const name = freeName(set, taken);
      const row: SpacecraftRow = {
        id: newId(),
        organisationId: caller.organisationId,
        name,
        shortName: shortNameOf(name),
        catalogNumber: set.catalogNumber > 0 ? set.catalogNumber : null,
        internationalDesignator: set.objectId || null,
        state: 'active',
        createdMs: this.clock.nowMs(),
      };
      this.spacecraft.add(tx, row);
      added.set(key, row);
    }
    return added;
  }

  private keep(
    tx: Db,
    caller: Principal,
    good: readonly ReadSet[],
    added: ReadonlyMap<string, SpacecraftRow>,
    source: string,
  ): ElementsRow[] {
    const addedMs = this.clock.nowMs();
    const rows = good.flatMap(({ set, digest, spacecraft, fate }) => {
      const home = spacecraft ?? added.get(objectKey(set));
      if (fate === 'duplicate' || !home) return [];
      return [
        {
          id: newId(),
          spacecraftId: home.id,
          epochUtc: set.epochUtc,
          epochMs: set.epochMs,
          format: set.format,
          elements: JSON.stringify(set),
          digest,
          source,
          addedBy: caller.personId,
          addedMs,
        },
      ];
    });
    this.elements.add(tx, rows);
    return rows;
  }

  private readView({ set, spacecraft, fate }: ReadSet): ReadElement {
    return {
      line: set.sourceLine,
      objectName: nameOf(set),
      objectId: set.objectId,
      catalogNumber: set.catalogNumber,
      epochUtc: set.epochUtc,
      ageH: (this.clock.nowMs() - set.epochMs) / HOUR_MS,
      fate,
      spacecraftId: spacecraft?.id ?? null,
      spacecraftName: spacecraft?.name ?? null,
    };
  }

  private summary(row: AddedElements): ElementSummary {
    const set = JSON.parse(row.elements) as ElementSet;
    const { ageH, timingErrorS } = freshnessOf(row.epochMs, set.meanMotionRevPerDay, this.clock.nowMs());
    return {
      id: row.id,
      epochUtc: row.epochUtc,
      ageH,
      timingErrorS,
      format: row.format,
      source: row.source,
      addedByName: row.addedByName,
      addedUtc: new Date(row.addedMs).toISOString(),
      meanMotionRevPerDay: set.meanMotionRevPerDay,
      eccentricity: set.eccentricity,
      inclinationDeg: set.inclinationDeg,
      ...orbitShape(set),
    };
  }
}

const kept = (row: ElementsRow): KeptElements => ({
  id: row.id,
  spacecraftId: row.spacecraftId,
  digest: row.digest,
  epochMs: row.epochMs,
  epochUtc: row.epochUtc,
  elementSet: JSON.parse(row.elements) as ElementSet,
});

const sourceOf = ({ fileName }: Text): string => (fileName ? `file ${fileName}` : 'pasted');

const homelessFault = ({ set }: ReadSet): ElementFault => ({
  line: set.sourceLine,
  field: 'object',
  found: nameOf(set),
  expected: 'one of your spacecraft',
  message: `${nameOf(set)} is none of your spacecraft, and none was to be added.`,
});

function unusable(faults: readonly ElementFault[], good: number): DomainError {
  const fields = faults.slice(0, FAULTS_IN_REFUSAL).map((fault) => ({
    pointer: '/text',
    detail: `Line ${fault.line}, ${fault.field}: ${fault.message}`,
  }));
  const count = `${faults.length} ${faults.length === 1 ? 'thing is' : 'things are'} wrong in the text`;
  const detail =
    good === 0
      ? `No usable element set was found; ${count}. Nothing was saved.`
      : `${count}. Nothing was saved; mend the text, or agree to keep only the good sets.`;
  return new DomainError('elements-unusable', detail, fields);
}
