/** Programs that act for an organisation. */
import { Module } from '@nestjs/common';
import { ApiKeyStrategy } from './api-key.strategy.js';
import { ApiKeysController } from './api-keys.controller.js';
import { ApiKeysRepository } from './api-keys.repository.js';
import { ApiKeysService } from './api-keys.service.js';

@Module({
  controllers: [ApiKeysController],
  providers: [ApiKeysRepository, ApiKeysService, ApiKeyStrategy],
})
export class ApiKeysModule {}
