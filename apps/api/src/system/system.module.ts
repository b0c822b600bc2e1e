/** Health, the API's description of itself, what waits for each person, and what staff watch. */

import { Module } from '@nestjs/common';
import { ClearanceRecordsModule } from '../clearances/clearance-records.module.js';
import { JobsModule } from '../jobs/jobs.module.js';
import { MessagesModule } from '../messages/messages.module.js';
import { OutboxModule } from '../outbox/outbox.module.js';
import { SpacecraftModule } from '../spacecraft/spacecraft.module.js';
import { HomeRepository } from './home.repository.js';
import { HomeService } from './home.service.js';
import { HomeFiguresRepository } from './home-figures.repository.js';
import { HomeFiguresService } from './home-figures.service.js';
import { Housekeeping } from './housekeeping.js';
import { ServicesWatch } from './services-watch.js';
import { SystemController } from './system.controller.js';
import { SystemRepository } from './system.repository.js';
import { SystemService } from './system.service.js';

@Module({
  imports: [MessagesModule, ClearanceRecordsModule, JobsModule, OutboxModule, SpacecraftModule],
  controllers: [SystemController],
  providers: [
    Housekeeping,
    HomeFiguresRepository,
    HomeFiguresService,
    HomeRepository,
    HomeService,
    ServicesWatch,
    SystemRepository,
    SystemService,
  ],
})
export class SystemModule {}
