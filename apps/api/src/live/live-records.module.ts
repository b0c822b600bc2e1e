/** The rows of live events, apart from the streams, because the run sheet reads them too. */
import { Module } from '@nestjs/common';
import { LiveRepository } from './live.repository.js';

@Module({ providers: [LiveRepository], exports: [LiveRepository] })
export class LiveRecordsModule {}
