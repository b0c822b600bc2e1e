/** Clearances in the words of the wire, for one caller. */
import { Injectable } from '@nestjs/common';
import {
  CLEARANCE_MOVES,
  type Clearance,
  type ClearanceAct,
  can,
  type Permission,
  type Principal,
} from '@skyberth/shared';
import { FilesService } from '../files/files.service.js';
import type { Db } from '../platform/transaction.js';
import { ClearanceBook } from './clearance-book.js';
import { ClearancesRepository, type NamedClearance } from './clearances.repository.js';

/** The kind under which papers are attached. */
export const PAPERS = 'clearance';

const PERMISSION_OF: Partial<Record<ClearanceAct, Permission>> = { withdraw: 'clearances.withdraw' };
const OWN_PERMISSION = {
  operator: 'clearances.request',
  owner: 'clearances.grant',
  staff: 'clearances.check',
} as const;
/** As whom a person of that kind of organisation acts. */
export const ACTOR_OF = { operator: 'operator', owner: 'owner', staff: 'admin' } as const;

const utc = (timeMs: number): string => new Date(timeMs).toISOString();

@Injectable()
export class ClearanceViews {
  constructor(
    private readonly repository: ClearancesRepository,
    private readonly book: ClearanceBook,
    private readonly files: FilesService,
  ) {}

  of(db: Db, caller: Principal, rows: readonly NamedClearance[]): Clearance[] {
    const ids = rows.map((row) => row.id);
    const papers = this.files.of(PAPERS, ids, db);
    const events = this.repository.events(db, ids);
    return rows.map((row) => ({
      id: row.id,
      number: row.number,
      spacecraftId: row.spacecraftId,
      spacecraftName: row.spacecraftName,
      operatorName: row.operatorName,
      stationId: row.stationId,
      stationName: row.stationName,
      ownerName: row.ownerName,
      band: row.band,
      direction: 'transmit',
      state: row.state,
      validFromUtc: utc(row.validFromMs),
      validToUtc: utc(row.validToMs),
      purpose: row.purpose,
      conditions: row.conditions,
      requestedUtc: utc(row.requestedMs),
      changedUtc: utc(row.changedMs),
      papers: papers.get(row.id) ?? [],
      history: events
        .filter((event) => event.clearanceId === row.id)
        .map(({ atMs, toState, sentence, byName }) => ({ atUtc: utc(atMs), toState, sentence, byName })),
      contactsToCome: this.book.bookingsToCome(db, row.id).length,
      acts: actsOf(caller, row.state),
    }));
  }
}

/** What the table of moves and that of permissions let this person do. */
function actsOf(caller: Principal, state: NamedClearance['state']): ClearanceAct[] {
  const { organisationKind } = caller;
  return CLEARANCE_MOVES.filter((move) => move.from === state && move.by.includes(ACTOR_OF[organisationKind]))
    .map((move) => move.act)
    .filter((act) => can(caller, PERMISSION_OF[act] ?? OWN_PERMISSION[organisationKind]));
}
