/** Stations and antennas: what an owner describes once, and publishes. */
import { Module } from '@nestjs/common';
import { AccountsModule } from '../accounts/accounts.module.js';
import { MailModule } from '../mail/mail.module.js';
import { AntennaCatalogue } from './antenna-catalogue.js';
import { AntennasController } from './antennas.controller.js';
import { AntennasRepository } from './antennas.repository.js';
import { AntennasService } from './antennas.service.js';
import { MaskHistoryController } from './mask-history.controller.js';
import { MaskHistoryRepository } from './mask-history.repository.js';
import { StationsController } from './stations.controller.js';
import { StationsRepository } from './stations.repository.js';
import { StationsService } from './stations.service.js';

@Module({
  imports: [AccountsModule, MailModule],
  controllers: [StationsController, AntennasController, MaskHistoryController],
  providers: [
    AntennaCatalogue,
    AntennasRepository,
    AntennasService,
    MaskHistoryRepository,
    StationsRepository,
    StationsService,
  ],
  exports: [AntennaCatalogue, AntennasRepository],
})
export class StationsModule {}
