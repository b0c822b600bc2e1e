/**
 * Takes in what the element feed has for spacecraft that are known by number, whoever's they are. Nothing else is kept,
 * and what cannot be true is left out: a feed is read by nobody. A person's own set with a newer epoch stays in force.
 */
import { Inject, Injectable, Logger, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import type { ElementSet } from '@skyberth/orbit';
import { JobsService } from '../jobs/jobs.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { DATABASE } from '../platform/database.module.js';
import { newId } from '../platform/ids.js';
import { write } from '../platform/transaction.js';
import { ELEMENT_FEED, type ElementFeedPort } from './element-feed.port.js';
import { digestOf } from './element-reading.js';
import { digestKey, ElementsRepository, type ElementsRow } from './elements.repository.js';
import { ElementsService } from './elements.service.js';
import { implausible } from './plausibility.js';
import { ELEMENT_READER, type ElementReader } from './reader/element-reader.js';
import { SpacecraftRepository } from './spacecraft.repository.js';

/** How often the job looks whether it is time. */
const TURN_MS = 30_000;
const POLL_MS = 15 * 60_000;
const LONGEST_WAIT_MS = 6 * 3_600_000;

@Injectable()
export class FeedPoller implements OnModuleInit {
  private readonly log = new Logger('Feed');
  private validator: string | null = null;
  private nextMs = 0;
  private failures = 0;

  constructor(
    @Inject(ELEMENT_FEED) private readonly feed: ElementFeedPort | null,
    @Inject(ELEMENT_READER) private readonly reader: ElementReader,
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly jobs: JobsService,
    private readonly spacecraft: SpacecraftRepository,
    private readonly rows: ElementsRepository,
    private readonly elements: ElementsService,
  ) {}

  onModuleInit(): void {
    const { feed } = this;
    if (feed) this.jobs.every('element feed', TURN_MS, () => this.turn(feed));
  }

  /** Polls when it is time; waits twice as long after each failure in a row. Throws what the feed threw. */
  private async turn(feed: ElementFeedPort): Promise<void> {
    const nowMs = this.clock.nowMs();
    if (nowMs < this.nextMs) return;
    this.failures += 1;
    this.nextMs = nowMs + Math.min(POLL_MS * 2 ** this.failures, LONGEST_WAIT_MS);
    const answer = await feed.fetch(this.validator);
    if (answer.kind === 'changed') {
      await this.takeIn(answer.text, feed.name);
      this.validator = answer.validator;
    }
    this.failures = 0;
    this.nextMs = nowMs + POLL_MS;
  }

  private async takeIn(text: string, source: string): Promise<void> {
    if (text.trim() === '[]') return; // A feed may have nothing to say; anything else without a set is a fault.
    const { sets, faults } = await this.reader.read({ text, fileName: null });
    if (sets.length === 0) throw new Error(`The feed held no usable element set, and ${faults.length} faults.`);
    const byNumber = new Map<number, ElementSet[]>();
    for (const set of sets) byNumber.set(set.catalogNumber, [...(byNumber.get(set.catalogNumber) ?? []), set]);
    const added = write(this.db, (tx) => {
      const fleet = this.spacecraft.withNumbers(tx, [...byNumber.keys()]);
      const { digests } = this.rows.known(
        tx,
        fleet.map((craft) => craft.id),
      );
      const fresh = fleet.flatMap((craft) =>
        (byNumber.get(craft.catalogNumber ?? 0) ?? [])
          .filter((set) => !digests.has(digestKey(craft.id, digestOf(set))))
          .filter((set) => this.believed(set, craft.id))
          .map((set) => this.row(set, craft.id, source)),
      );
      this.rows.add(tx, fresh);
      return fresh.length;
    });
    if (added > 0 || faults.length > 0) this.log.log(`${source}: ${added} new sets, ${faults.length} faults left out`);
  }

  private believed(set: ElementSet, spacecraftId: string): boolean {
    const nowMs = this.clock.nowMs();
    const before = this.elements.inForce(spacecraftId, nowMs)?.elementSet ?? null;
    const why = implausible(set, before, nowMs);
    if (why) this.log.warn(`${why} It was left out.`);
    return why === null;
  }

  private row(set: ElementSet, spacecraftId: string, source: string): ElementsRow {
    return {
      id: newId(),
      spacecraftId,
      epochUtc: set.epochUtc,
      epochMs: set.epochMs,
      format: set.format,
      elements: JSON.stringify(set),
      digest: digestOf(set),
      source,
      addedBy: null,
      addedMs: this.clock.nowMs(),
    };
  }
}
