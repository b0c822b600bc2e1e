/** Column kinds used everywhere: text ids, UTC milliseconds, whole minor units. */
import { integer, text } from 'drizzle-orm/sqlite-core';

export const id = () => text('id').primaryKey();
export const ms = (name: string) => integer(name, { mode: 'number' });
export const minor = (name: string) => integer(name, { mode: 'number' });
export const flag = (name: string) => integer(name, { mode: 'boolean' });
export const json = <T>(name: string) => text(name, { mode: 'json' }).$type<T>();
