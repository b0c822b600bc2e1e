/** Who is signed in, and what they may do. */
import { can, type Permission, routes, type Session } from '@skyberth/shared';
import { queryOptions, useQuery, useQueryClient } from '@tanstack/react-query';
import { call, ProblemError } from './api-client.js';
import { setServerTime } from './server-clock.js';

export const sessionQuery = queryOptions({
  queryKey: ['session'],
  queryFn: async ({ signal }): Promise<Session | null> => {
    try {
      const session = await call(routes.session, { signal });
      setServerTime(session.serverTimeUtc);
      return session;
    } catch (error) {
      if (error instanceof ProblemError && error.problem?.status === 401) return null;
      throw error;
    }
  },
  staleTime: 5 * 60_000,
});

/** The session on pages behind the sign-in, where there is always one. */
export function useSession(): Session {
  const { data } = useQuery(sessionQuery);
  if (!data) throw new Error('This page is only for signed-in people.');
  return data;
}

/** Whether the caller may do that; what they may not is not offered. */
export function useCan(): (permission: Permission) => boolean {
  const { active } = useSession();
  return (permission) => can({ organisationKind: active.organisationKind, role: active.role }, permission);
}

/** Puts a new session in place and forgets everything the former one had fetched. */
export function useEnterSession(): (session: Session | null) => void {
  const client = useQueryClient();
  return (session) => {
    client.clear();
    if (session) setServerTime(session.serverTimeUtc);
    client.setQueryData(sessionQuery.queryKey, session);
  };
}
