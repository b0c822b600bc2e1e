/** The run sheet, with the last one known kept in this browser for when the line is gone. */
import { RunSheet, routes } from '@skyberth/shared';
import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { call, ProblemError } from '../../lib/api-client.js';
import { useSession } from '../../lib/session.js';

const LOOK_AGAIN_MS = 30_000;

/** Whose sheet, and of which station; null for the first one by name. */
export interface SheetPlace {
  readonly organisationId: string;
  readonly stationId: string | null;
}

const runSheetQuery = (place: SheetPlace) =>
  queryOptions({
    queryKey: ['run-sheet', place],
    queryFn: async ({ signal }) => {
      const query = place.stationId ? { stationId: place.stationId } : {};
      const sheet = await call(routes.runSheet, { query, signal });
      keep(place, sheet);
      return sheet;
    },
    refetchInterval: LOOK_AGAIN_MS,
    // Without an answer the last list is shown at once, not after a few more tries.
    retry: (failures, error) => !(error instanceof ProblemError && error.problem === null) && failures < 2,
  });

export interface KnownSheet {
  readonly sheet: RunSheet | null;
  /** The line is gone; the sheet is the last one known. */
  readonly isOld: boolean;
  readonly error: Error | null;
  readonly retry: () => void;
}

/** The sheet of this moment, or the last known one of the same organisation while the server cannot be reached. */
export function useRunSheet(stationId: string | null): KnownSheet {
  const place = { organisationId: useSession().active.organisationId, stationId };
  const query = useQuery(runSheetQuery(place));
  const isOld = query.error !== null || query.fetchStatus === 'paused';
  return {
    sheet: query.data ?? (isOld ? lastKnown(place) : null),
    isOld,
    error: query.error,
    retry: () => void query.refetch(),
  };
}

const nameOf = ({ organisationId, stationId }: SheetPlace): string =>
  `skyberth run sheet ${organisationId} ${stationId ?? 'first'}`;

function keep(place: SheetPlace, sheet: RunSheet): void {
  try {
    window.localStorage.setItem(nameOf(place), JSON.stringify(sheet));
  } catch {
    // A browser that keeps nothing shows nothing later; the sheet of this moment is there all the same.
  }
}

function lastKnown(place: SheetPlace): RunSheet | null {
  try {
    const text = window.localStorage.getItem(nameOf(place));
    return text === null ? null : (RunSheet.safeParse(JSON.parse(text)).data ?? null);
  } catch {
    return null;
  }
}

function useChange<T>(change: (input: T) => Promise<unknown>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: change,
    onSettled: () => client.invalidateQueries({ queryKey: ['run-sheet'] }),
  });
}

export const useEnter = (id: string) =>
  useChange((name: string) => call(routes.enterDish, { params: { id }, body: { name } }));
export const useLeave = () => useChange((visitId: string) => call(routes.leaveDish, { params: { id: visitId } }));
export const useStop = (id: string) =>
  useChange((reason: string) => call(routes.stopDish, { params: { id }, body: { reason } }));
export const useRelease = (id: string) => useChange((_: undefined) => call(routes.releaseDish, { params: { id } }));
export const useHandOver = (id: string) =>
  useChange((text: string) => call(routes.writeHandOver, { params: { id }, body: { text } }));
