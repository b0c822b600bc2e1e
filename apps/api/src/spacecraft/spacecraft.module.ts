/** Spacecraft, their radios, and the element sets that say where they are. */
import { Module } from '@nestjs/common';
import { ElementsRepository } from './elements.repository.js';
import { ElementsService } from './elements.service.js';
import { SpacecraftController } from './spacecraft.controller.js';
import { SpacecraftRepository } from './spacecraft.repository.js';
import { SpacecraftService } from './spacecraft.service.js';

@Module({
  controllers: [SpacecraftController],
  providers: [ElementsRepository, ElementsService, SpacecraftRepository, SpacecraftService],
  exports: [ElementsService, SpacecraftService],
})
export class SpacecraftModule {}
