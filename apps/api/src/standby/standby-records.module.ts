/** The lines of those who wait; apart from the use cases, because a hold asks whether others are in line. */
import { Module } from '@nestjs/common';
import { StandbyRepository } from './standby.repository.js';

@Module({ providers: [StandbyRepository], exports: [StandbyRepository] })
export class StandbyRecordsModule {}
