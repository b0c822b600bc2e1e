/** Addresses and pages. Each page is its own chunk, loaded when first opened. */
import { type QueryClient } from '@tanstack/react-query';
import { createBrowserRouter, type LoaderFunctionArgs, type RouteObject, redirect } from 'react-router-dom';
import { paths } from '../lib/paths.js';
import { sessionQuery } from '../lib/session.js';
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
    path: paths.home,
    lazy: async () => ({ Component: (await import('../features/home/home-page.js')).HomePage }),
  },
  {
    path: paths.findTime,
    lazy: async () => ({ Component: (await import('../features/find-time/find-time-page.js')).FindTimePage }),
  },
  {
    path: paths.plans,
    lazy: async () => ({ Component: (await import('../features/plan/plan-page.js')).PlanPage }),
  },
  {
    path: paths.plan(':id'),
    lazy: async () => ({ Component: (await import('../features/plan/one-plan-page.js')).OnePlanPage }),
  },
  {
    path: paths.bookings,
    lazy: async () => ({ Component: (await import('../features/bookings/bookings-page.js')).BookingsPage }),
  },
  {
    path: paths.booking(':id'),
    lazy: async () => ({ Component: (await import('../features/contact/contact-page.js')).ContactPage }),
  },
  {
    path: paths.spacecraft,
    lazy: async () => ({ Component: (await import('../features/spacecraft/spacecraft-page.js')).SpacecraftPage }),
  },
  {
    path: paths.newSpacecraft,
    lazy: async () => ({
      Component: (await import('../features/spacecraft/spacecraft-edit-page.js')).NewSpacecraftPage,
    }),
  },
  {
    path: paths.addElements,
    lazy: async () => ({ Component: (await import('../features/spacecraft/elements-page.js')).ElementsPage }),
  },
  {
    path: paths.oneSpacecraft(':id'),
    lazy: async () => ({
      Component: (await import('../features/spacecraft/one-spacecraft-page.js')).OneSpacecraftPage,
    }),
  },
  {
    path: paths.editSpacecraft(':id'),
    lazy: async () => ({
      Component: (await import('../features/spacecraft/spacecraft-edit-page.js')).EditSpacecraftPage,
    }),
  },
  {
    path: paths.standby,
    lazy: async () => ({ Component: (await import('../features/standby/standby-page.js')).StandbyPage }),
  },
  {
    path: paths.invoices,
    lazy: async () => ({ Component: (await import('../features/invoices/invoices-page.js')).InvoicesPage }),
  },
  {
    path: paths.invoice(':id'),
    lazy: async () => ({ Component: (await import('../features/invoices/invoice-page.js')).InvoicePage }),
  },
  {
    path: paths.organisation,
    lazy: async () => ({ Component: (await import('../features/organisation/organisation-page.js')).OrganisationPage }),
  },
  {
    path: paths.stations,
    lazy: async () => ({ Component: (await import('../features/stations/stations-page.js')).StationsPage }),
  },
  {
    path: paths.newStation,
    lazy: async () => ({ Component: (await import('../features/stations/station-edit-page.js')).NewStationPage }),
  },
  {
    path: paths.station(':id'),
    lazy: async () => ({ Component: (await import('../features/stations/station-page.js')).StationPage }),
  },
  {
    path: paths.editStation(':id'),
    lazy: async () => ({ Component: (await import('../features/stations/station-edit-page.js')).EditStationPage }),
  },
  {
    path: paths.newAntenna(':id'),
    lazy: async () => ({ Component: (await import('../features/antenna/new-antenna-page.js')).NewAntennaPage }),
  },
  {
    path: paths.antenna(':id'),
    lazy: async () => ({ Component: (await import('../features/antenna/antenna-page.js')).AntennaPage }),
  },
  {
    path: paths.availability,
    lazy: async () => ({ Component: (await import('../features/availability/availability-page.js')).AvailabilityPage }),
  },
  {
    path: paths.requests,
    lazy: async () => ({ Component: (await import('../features/requests/requests-page.js')).RequestsPage }),
  },
  {
    path: paths.clearances,
    lazy: async () => ({ Component: (await import('../features/clearances/clearances-page.js')).ClearancesPage }),
  },
  {
    path: paths.newClearance,
    lazy: async () => ({ Component: (await import('../features/clearances/request-page.js')).RequestClearancePage }),
  },
  {
    path: paths.clearance(':id'),
    lazy: async () => ({ Component: (await import('../features/clearances/clearance-page.js')).ClearancePage }),
  },
  {
    path: paths.approvals,
    lazy: async () => ({ Component: (await import('../features/approvals/approvals-page.js')).ApprovalsPage }),
  },
  {
    path: paths.approval(':id'),
    lazy: async () => ({ Component: (await import('../features/approvals/approval-page.js')).ApprovalPage }),
  },
  {
    path: paths.messages,
    lazy: async () => ({ Component: (await import('../features/messages/messages-page.js')).MessagesPage }),
  },
  {
    path: paths.disputes,
    lazy: async () => ({ Component: (await import('../features/disputes/disputes-page.js')).DisputesPage }),
  },
  {
    path: paths.dispute(':id'),
    lazy: async () => ({ Component: (await import('../features/disputes/dispute-page.js')).DisputePage }),
  },
  {
    path: paths.openDispute(':id'),
    lazy: async () => ({ Component: (await import('../features/disputes/open-dispute-page.js')).OpenDisputePage }),
  },
  {
    path: paths.accounts,
    lazy: async () => ({ Component: (await import('../features/oversight/accounts-page.js')).AccountsPage }),
  },
  {
    path: paths.account(':id'),
    lazy: async () => ({ Component: (await import('../features/oversight/account-page.js')).AccountPage }),
  },
  {
    path: paths.audit,
    lazy: async () => ({ Component: (await import('../features/oversight/audit-page.js')).AuditPage }),
  },
  {
    path: paths.help,
    lazy: async () => ({ Component: (await import('../features/help/help-page.js')).HelpPage }),
  },
  {
    path: paths.monthlyAccount,
    lazy: async () => ({
      Component: (await import('../features/credit-accounts/monthly-account-page.js')).MonthlyAccountPage,
    }),
  },
  {
    path: paths.creditAccounts,
    lazy: async () => ({
      Component: (await import('../features/credit-accounts/credit-accounts-page.js')).CreditAccountsPage,
    }),
  },
  {
    path: paths.taxAndFees,
    lazy: async () => ({ Component: (await import('../features/tax/tax-page.js')).TaxPage }),
  },
  {
    path: paths.reconciliation,
    lazy: async () => ({
      Component: (await import('../features/reconciliation/reconciliation-page.js')).ReconciliationPage,
    }),
  },
  {
    path: paths.runSheet,
    lazy: async () => ({ Component: (await import('../features/run-sheet/run-sheet-page.js')).RunSheetPage }),
  },
  {
    path: paths.runSheetWall,
    lazy: async () => ({ Component: (await import('../features/run-sheet/wall-page.js')).WallPage }),
  },
  {
    path: paths.payouts,
    lazy: async () => ({ Component: (await import('../features/payouts/payouts-page.js')).PayoutsPage }),
  },
  {
    path: paths.payoutRun(':id'),
    lazy: async () => ({ Component: (await import('../features/payouts/payout-run-page.js')).PayoutRunPage }),
  },
  {
    path: paths.security,
    lazy: async () => ({ Component: (await import('../features/security/security-page.js')).SecurityPage }),
  },
  {
    path: paths.keys,
    lazy: async () => ({ Component: (await import('../features/keys/keys-page.js')).KeysPage }),
  },
  {
    path: paths.ledger,
    lazy: async () => ({ Component: (await import('../features/ledger/ledger-page.js')).LedgerPage }),
  },
  {
    path: paths.system,
    lazy: async () => ({ Component: (await import('../features/system/system-page.js')).SystemPage }),
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
  return createBrowserRouter([
    {
      ErrorBoundary: PageFailure,
      HydrateFallback: Nothing,
      children: [
        ...openPages,
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
