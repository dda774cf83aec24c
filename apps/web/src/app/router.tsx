import type { Permission } from '@app/contracts';
import { createBrowserRouter, type RouteObject } from 'react-router-dom';
import { DeskPage } from '../features/desk/pages/desk-page';
import { SignInPage } from '../features/sign-in/pages/sign-in-page';
import { Skeleton } from '../shared/ui/skeleton';
import { ErrorPage } from './error-page';
import { MayOpen } from './may-open';
import { NotFoundPage } from './not-found-page';
import { PlanRedirect } from './plan-redirect';
import { SignedIn } from './signed-in';
import { routes } from './urls';

const page = (path: string, lazy: RouteObject['lazy']): RouteObject => ({ path, lazy, errorElement: <ErrorPage /> });

/** A page without the frame, which it would otherwise wait in. */
const bare = (route: RouteObject): RouteObject => ({ ...route, hydrateFallbackElement: <Skeleton lines={3} /> });

/** A page of a plant that only some roles open. */
const pageFor = (permission: Permission, title: string, path: string, lazy: RouteObject['lazy']): RouteObject => ({
  path,
  element: <MayOpen permission={permission} title={title} />,
  children: [{ index: true, lazy, errorElement: <ErrorPage /> }],
});

/** Where the frame itself failed. */
const bareErrorPage = (
  <main className="page">
    <ErrorPage />
  </main>
);

export const router = createBrowserRouter([
  { path: routes.signIn, element: <SignInPage />, errorElement: bareErrorPage },
  ...[routes.invitation, routes.newPassword].map((path) =>
    bare(page(path, async () => ({ Component: (await import('../features/links/pages/link-page')).LinkPage }))),
  ),
  bare(
    page(routes.forgottenPassword, async () => ({
      Component: (await import('../features/links/pages/forgotten-password-page')).ForgottenPasswordPage,
    })),
  ),
  {
    element: <SignedIn />,
    errorElement: bareErrorPage,
    hydrateFallbackElement: <Skeleton lines={3} />,
    children: [
      { path: routes.desk, element: <DeskPage />, errorElement: <ErrorPage /> },
      page(routes.lots, async () => ({ Component: (await import('../features/lots/pages/lots-page')).LotsPage })),
      page(routes.lot, async () => ({ Component: (await import('../features/lots/pages/lot-page')).LotPage })),
      page(routes.channels, async () => ({
        Component: (await import('../features/channels/pages/channels-page')).ChannelsPage,
      })),
      page(routes.channel, async () => ({
        Component: (await import('../features/channel-record/pages/channel-record-page')).ChannelRecordPage,
      })),
      page(routes.hold, async () => ({ Component: (await import('../features/hold/pages/hold-page')).HoldPage })),
      page(routes.intakes, async () => ({
        Component: (await import('../features/intake/pages/intakes-page')).IntakesPage,
      })),
      page(routes.intake, async () => ({
        Component: (await import('../features/intake/pages/intake-page')).IntakePage,
      })),
      page(routes.plans, async () => ({ Component: (await import('../features/plan/pages/plan-page')).PlanPage })),
      pageFor('read_summary', 'Weekly summaries', routes.summaries, async () => ({
        Component: (await import('../features/summary/pages/summaries-page')).SummariesPage,
      })),
      page(routes.summary, async () => ({
        Component: (await import('../features/summary/pages/summary-page')).SummaryPage,
      })),
      pageFor('read_audit', 'Audit', routes.audit, async () => ({
        Component: (await import('../features/audit/pages/audit-page')).AuditPage,
      })),
      pageFor('set_up_plant', 'Mail', routes.mails, async () => ({
        Component: (await import('../features/mails/pages/mails-page')).MailsPage,
      })),
      page(routes.mail, async () => ({ Component: (await import('../features/mails/pages/mail-page')).MailPage })),
      { path: routes.plan, element: <PlanRedirect /> },
      page(routes.newPlant, async () => ({
        Component: (await import('../features/set-up/pages/new-plant-page')).NewPlantPage,
      })),
      ...[routes.setUp, routes.setUpSection].map((path) =>
        page(path, async () => ({ Component: (await import('../features/set-up/pages/set-up-page')).SetUpPage })),
      ),
      pageFor('set_up_plant', 'People', routes.people, async () => ({
        Component: (await import('../features/people/pages/people-page')).PeoplePage,
      })),
      page(routes.profile, async () => ({
        Component: (await import('../features/profile/pages/profile-page')).ProfilePage,
      })),
      { path: '*', element: <NotFoundPage /> },
    ],
  },
]);
