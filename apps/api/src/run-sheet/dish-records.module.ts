/** Who is at which dish, apart from the run sheet, because nothing may begin on a dish that is not clear. */
import { Module } from '@nestjs/common';
import { DishRepository } from './dish.repository.js';

@Module({ providers: [DishRepository], exports: [DishRepository] })
export class DishRecordsModule {}
