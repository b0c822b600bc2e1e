/** Finding contact time: passes, offers, prices, and the files for flying a contact. */
import { Inject, Module, type OnApplicationShutdown } from '@nestjs/common';
import { BookingRecordsModule } from '../bookings/booking-records.module.js';
import { ClearanceRecordsModule } from '../clearances/clearance-records.module.js';
import { CONFIG, type Config } from '../platform/config.js';
import { SpacecraftModule } from '../spacecraft/spacecraft.module.js';
import { StationsModule } from '../stations/stations.module.js';
import { ContactFiles } from './contact-files.js';
import { MarketController } from './market.controller.js';
import { MarketRepository } from './market.repository.js';
import { MarketService } from './market.service.js';
import { MarketInputs } from './market-inputs.js';
import { NightKeeper } from './night-keeper.js';
import { OfferService } from './offer.service.js';
import { PassFinder } from './pass-finder.js';
import { InProcessEngine } from './workers/in-process-engine.js';
import { PASS_ENGINE, type PassEngine } from './workers/pass-engine.js';
import { PiscinaEngine } from './workers/piscina-engine.js';

/** Where passes are computed is the server's setting: worker threads, or none of them. */
const engineFor = (config: Config): PassEngine =>
  config.passWorkers === 0 ? new InProcessEngine() : new PiscinaEngine(config.passWorkers);

@Module({
  imports: [BookingRecordsModule, ClearanceRecordsModule, SpacecraftModule, StationsModule],
  controllers: [MarketController],
  providers: [
    { provide: PASS_ENGINE, inject: [CONFIG], useFactory: engineFor },
    MarketRepository,
    MarketInputs,
    NightKeeper,
    PassFinder,
    MarketService,
    OfferService,
    ContactFiles,
  ],
  exports: [MarketInputs, MarketService, OfferService, ContactFiles, PASS_ENGINE],
})
export class MarketModule implements OnApplicationShutdown {
  constructor(@Inject(PASS_ENGINE) private readonly engine: PassEngine) {}

  async onApplicationShutdown(): Promise<void> {
    await this.engine.close();
  }
}
