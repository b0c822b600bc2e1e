/** Makes the files of a booked contact, for the station's antenna control and for calendars. */
import { Inject, Injectable } from '@nestjs/common';
import { icalendar } from '@skyberth/orbit';
import type { bookingRoutes } from '@skyberth/shared';
import type { z } from 'zod';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DomainError } from '../platform/domain-error.js';
import { CALENDAR_PRODUCT, contactEvent } from './contact-event.js';
import { MarketRepository } from './market.repository.js';
import type { BookedContact } from './market.service.js';
import { MarketInputs } from './market-inputs.js';
import { PASS_ENGINE, type PassEngine } from './workers/pass-engine.js';

export type ContactFile = z.output<typeof bookingRoutes.bookingFile.params>['file'];

/** A booking as its files need it. */
export interface FiledContact extends BookedContact {
  readonly id: string;
  readonly number: number;
  readonly tcaMs: number;
  readonly state: string;
  /** Goes up with each change, so that a calendar replaces its entry. */
  readonly changedMs: number;
}

export interface MadeFile {
  readonly body: string;
  readonly contentType: string;
  readonly fileName: string;
}

const MEDIA_TYPES: Readonly<Record<ContactFile, string>> = {
  'pointing.csv': 'text/csv; charset=utf-8',
  'frequency.csv': 'text/csv; charset=utf-8',
  'ephemeris.oem': 'text/plain; charset=utf-8',
  'elements.omm': 'text/plain; charset=utf-8',
  'contact.ics': 'text/calendar; charset=utf-8',
};

@Injectable()
export class ContactFiles {
  constructor(
    private readonly inputs: MarketInputs,
    private readonly repository: MarketRepository,
    @Inject(PASS_ENGINE) private readonly engine: PassEngine,
    @Inject(CLOCK) private readonly clock: ClockPort,
    @Inject(CONFIG) private readonly config: Config,
  ) {}

  /** By the elements in force for the contact. Throws `not-found` and `elements-unusable`. */
  async make(file: ContactFile, booking: FiledContact): Promise<MadeFile> {
    const body = file === 'contact.ics' ? this.calendar(booking) : await this.flightFile(file, booking);
    return { body, contentType: MEDIA_TYPES[file], fileName: `skyberth-${booking.number}-${file}` };
  }

  private async flightFile(file: Exclude<ContactFile, 'contact.ics'>, booking: FiledContact): Promise<string> {
    const { operatorId, need, aosMs, tcaMs, losMs } = booking;
    const { craft, sale, antenna } = this.parties(booking);
    const outcome = await this.engine.run(
      {
        kind: 'file',
        file,
        createdMs: this.clock.nowMs(),
        need,
        aosMs,
        tcaMs,
        losMs,
        spacecraft: craft,
        antenna,
        stationName: sale.stationName,
        operatorName: this.repository.taxedOrganisation(operatorId)?.name ?? 'unknown',
      },
      antenna.id,
    );
    if (outcome.kind === 'elements unusable') throw new DomainError('elements-unusable', outcome.sentence);
    return outcome.text;
  }

  private calendar(booking: FiledContact): string {
    const { craft, sale } = this.parties(booking);
    const summary = `${craft.name} over ${sale.name}`;
    const { stationName, site } = sale;
    const { publicUrl } = this.config;
    const event = contactEvent(booking, { summary, stationName, site, publicUrl, stampMs: this.clock.nowMs() });
    return icalendar([event], { name: summary, productId: CALENDAR_PRODUCT });
  }

  private parties(booking: FiledContact) {
    const period = { fromMs: booking.aosMs, toMs: booking.losMs };
    const [craft] = this.inputs.craft(booking.operatorId, [booking.spacecraftId], period);
    const sale = this.inputs.antenna(booking.antennaId, period);
    const [antenna] = this.inputs.forEngine(booking.operatorId, [sale], period);
    if (craft === undefined || antenna === undefined) throw new Error('What was found must be among the answers.');
    return { craft, sale, antenna };
  }
}
