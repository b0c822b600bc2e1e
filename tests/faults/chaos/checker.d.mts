import type Database from 'better-sqlite3';

export interface Books {
  readonly intents: readonly { id: string; status: string; amountMinor: number; receivedMinor: number }[];
  readonly refunds: readonly { intentId: string; amountMinor: number }[];
  readonly receipts: readonly { operatorId: string; bookingIds: readonly string[]; mayHaveMade: number }[];
}

export function faultsIn(db: Database.Database, books: Books): Record<string, unknown[]>;
