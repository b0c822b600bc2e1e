/** The database: its schema, how it is opened, and how it is brought up to date. */

export * from './open.js';
export * from './schema/index.js';
export * as schema from './schema/index.js';
