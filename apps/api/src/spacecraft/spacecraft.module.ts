/** Spacecraft, their radios, and the element sets that say where they are. */
import { Inject, Module, type OnApplicationShutdown } from '@nestjs/common';
import { HttpFeedAdapter } from '../adapters/elements/http-feed.adapter.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { CONFIG, type Config } from '../platform/config.js';
import { ELEMENT_FEED, type ElementFeedPort } from './element-feed.port.js';
import { ElementsRepository } from './elements.repository.js';
import { ElementsService } from './elements.service.js';
import { EphemeridesController } from './ephemerides.controller.js';
import { EphemeridesRepository } from './ephemerides.repository.js';
import { EphemeridesService } from './ephemerides.service.js';
import { FeedPoller } from './feed-poller.js';
import { ELEMENT_READER, type ElementReader, InProcessReader } from './reader/element-reader.js';
import { PiscinaReader } from './reader/piscina-reader.js';
import { SpacecraftController } from './spacecraft.controller.js';
import { SpacecraftRepository } from './spacecraft.repository.js';
import { SpacecraftService } from './spacecraft.service.js';

/** Long texts are read in a worker thread wherever passes are computed in some. */
const readerFor = (config: Config): ElementReader =>
  config.passWorkers === 0 ? new InProcessReader() : new PiscinaReader();

const feedFor = (config: Config): ElementFeedPort | null =>
  config.elementFeedUrl === undefined ? null : new HttpFeedAdapter(config.elementFeedUrl);

@Module({
  imports: [JobsModule],
  controllers: [SpacecraftController, EphemeridesController],
  providers: [
    { provide: ELEMENT_READER, inject: [CONFIG], useFactory: readerFor },
    { provide: ELEMENT_FEED, inject: [CONFIG], useFactory: feedFor },
    ElementsRepository,
    ElementsService,
    EphemeridesRepository,
    EphemeridesService,
    FeedPoller,
    SpacecraftRepository,
    SpacecraftService,
  ],
  exports: [ElementsService, EphemeridesService, SpacecraftService],
})
export class SpacecraftModule implements OnApplicationShutdown {
  constructor(@Inject(ELEMENT_READER) private readonly reader: ElementReader) {}

  async onApplicationShutdown(): Promise<void> {
    await this.reader.close();
  }
}
