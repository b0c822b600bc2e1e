import { paths } from '../../lib/paths.js';

/** Where to go after the sign-in: only ever to a page of our own. */
export function afterSignIn(then: string | null): string {
  if (!then?.startsWith('/') || then.startsWith('//') || then.includes('\\')) return paths.home;
  return then;
}
