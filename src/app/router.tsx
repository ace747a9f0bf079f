import { createBrowserRouter, type RouteObject } from 'react-router-dom';
import { Waiting } from '../ui/Loaded.tsx';
import { ErrorPage } from './ErrorPage.tsx';
import { HomePage } from './HomePage.tsx';
import { Shell } from './Shell.tsx';

type Module<Name extends string> = Promise<Record<Name, React.ComponentType>>;

/** A page that is loaded when it is first opened. */
function page<Name extends string>(path: string, name: Name, load: () => Module<Name>): RouteObject {
  return { path, lazy: async () => ({ Component: (await load())[name] }) };
}

const signedIn: RouteObject[] = [
  { index: true, Component: HomePage },
  page('today', 'TodayPage', () => import('../audit/TodayPage.tsx')),
  page('exceptions', 'ExceptionsPage', () => import('../audit/ExceptionsPage.tsx')),
  page('lapsing', 'LapsingPage', () => import('../audit/LapsingPage.tsx')),
  page('to-sign', 'ToSignPage', () => import('../signons/ToSignPage.tsx')),
  page('statements', 'StatementListPage', () => import('../statements/StatementListPage.tsx')),
  page('statements/new', 'NewStatementPage', () => import('../statements/NewStatementPage.tsx')),
  page('statements/:id', 'StatementPage', () => import('../statements/StatementPage.tsx')),
  page('statements/:id/revisions/:number', 'RevisionPage', () => import('../statements/RevisionPage.tsx')),
  page('register', 'RegisterPage', () => import('../signons/RegisterPage.tsx')),
  page('sign-ons/:id', 'SignOnRecordPage', () => import('../signons/SignOnRecordPage.tsx')),
  page('sites', 'SiteListPage', () => import('../sites/SiteListPage.tsx')),
  page('sites/new', 'SiteFormPage', () => import('../sites/SiteFormPage.tsx')),
  page('sites/:id', 'SitePage', () => import('../sites/SitePage.tsx')),
  page('sites/:id/edit', 'SiteFormPage', () => import('../sites/SiteFormPage.tsx')),
  page('sites/:siteId/hand-round', 'HandedRoundPage', () => import('../signons/HandedRoundPage.tsx')),
  page('people', 'PeopleListPage', () => import('../people/PeopleListPage.tsx')),
  page('people/:id', 'PersonPage', () => import('../people/PersonPage.tsx')),
  page('employers', 'EmployersPage', () => import('../people/EmployersPage.tsx')),
  page('talks', 'TalkListPage', () => import('../talks/TalkListPage.tsx')),
  page('talks/:id', 'TalkPage', () => import('../talks/TalkPage.tsx')),
  page('members', 'MembersPage', () => import('../account/MembersPage.tsx')),
  page('account', 'AccountPage', () => import('../account/AccountPage.tsx')),
];

export const router = createBrowserRouter([
  {
    HydrateFallback: () => <Waiting />,
    ErrorBoundary: ErrorPage,
    children: [
      page('sign-in', 'SignInPage', () => import('../account/SignInPage.tsx')),
      page('reset', 'AskResetPage', () => import('../account/AskResetPage.tsx')),
      page('reset/:token', 'ResetPage', () => import('../account/ResetPage.tsx')),
      page('outbox', 'OutboxPage', () => import('../account/OutboxPage.tsx')),
      page('verify/:hash', 'VerifyPage', () => import('../statements/VerifyPage.tsx')),
      page('statements/:id/print', 'PrintPage', () => import('../statements/PrintPage.tsx')),
      page(
        'statements/:id/revisions/:number/print',
        'PrintPage',
        () => import('../statements/PrintPage.tsx'),
      ),
      page('sites/:id/board-sheet', 'BoardSheetPage', () => import('../sites/BoardSheetPage.tsx')),
      { path: '/', Component: Shell, children: signedIn },
    ],
  },
]);
