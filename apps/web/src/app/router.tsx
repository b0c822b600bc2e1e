/** Addresses and pages. Each page is its own chunk, loaded when first opened. */
import { type QueryClient } from '@tanstack/react-query';
import { createBrowserRouter, type LoaderFunctionArgs, type RouteObject, redirect } from 'react-router-dom';
import { paths } from '../lib/paths.js';
import { sessionQuery } from '../lib/session.js';
import { pagesFor } from './navigation.js';
import { NotFoundPage, PageFailure } from './page-failure.js';

/** Pages for people who are not signed in. */
const openPages: RouteObject[] = [
  {
    path: paths.signIn,
    lazy: async () => ({ Component: (await import('../features/auth/sign-in-page.js')).SignInPage }),
  },
  {
    path: paths.signUp,
    lazy: async () => ({ Component: (await import('../features/auth/sign-up-page.js')).SignUpPage }),
  },
  {
    path: paths.forgot,
    lazy: async () => ({ Component: (await import('../features/auth/forgotten-page.js')).ForgottenPage }),
  },
  {
    path: paths.setPassword,
    lazy: async () => ({ Component: (await import('../features/auth/set-password-page.js')).SetPasswordPage }),
  },
  {
    path: paths.verifyEmail,
    lazy: async () => ({ Component: (await import('../features/auth/verify-email-page.js')).VerifyEmailPage }),
  },
];

/** Pages behind the sign-in, inside the frame. */
const memberPages: RouteObject[] = [
  {
    path: paths.organisation,
    lazy: async () => ({ Component: (await import('../features/organisation/organisation-page.js')).OrganisationPage }),
  },
];

/** While the first page loads, paper; anything else would flicker. */
function Nothing() {
  return null;
}

export function createRouter(client: QueryClient) {
  const requireSession = async ({ request }: LoaderFunctionArgs) => {
    const session = await client.fetchQuery({ ...sessionQuery, staleTime: 60_000 });
    if (session) return null;
    const url = new URL(request.url);
    return redirect(`${paths.signIn}?then=${encodeURIComponent(url.pathname + url.search)}`);
  };
  const toMainPage = async () => {
    const session = await client.fetchQuery({ ...sessionQuery, staleTime: 60_000 });
    const main = session ? pagesFor(session.active)[0] : undefined;
    return redirect(main?.to ?? paths.signIn);
  };
  return createBrowserRouter([
    {
      ErrorBoundary: PageFailure,
      HydrateFallback: Nothing,
      children: [
        ...openPages,
        { path: paths.home, loader: toMainPage },
        {
          lazy: async () => ({ Component: (await import('./layout.js')).Layout }),
          loader: requireSession,
          children: [
            { ErrorBoundary: PageFailure, children: [...memberPages, { path: '*', Component: NotFoundPage }] },
          ],
        },
      ],
    },
  ]);
}
