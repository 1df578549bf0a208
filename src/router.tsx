import { createBrowserRouter, type RouteObject } from 'react-router';
import { FaultPage } from './routes/fault-page.tsx';
import { ShellRoute } from './routes/shell-route.tsx';

/** Pages are read when they are first opened; only the shell is in the first script. */
const pages: RouteObject[] = [
  {
    index: true,
    lazy: async () => ({ Component: (await import('./routes/overview/overview-page.tsx')).OverviewPage }),
  },
  {
    path: 'new-library',
    lazy: async () => ({
      Component: (await import('./routes/settings/new-library-page.tsx')).NewLibraryPage,
    }),
  },
  {
    path: 'libraries/:library/settings/:page?',
    lazy: async () => ({ Component: (await import('./routes/settings/settings-page.tsx')).SettingsPage }),
  },
  {
    path: 'site/:page?',
    lazy: async () => ({ Component: (await import('./routes/admin/site-page.tsx')).SitePage }),
  },
  {
    path: 'account',
    lazy: async () => ({ Component: (await import('./routes/account/account-page.tsx')).AccountPage }),
  },
  {
    path: 'libraries',
    lazy: async () => ({ Component: (await import('./routes/libraries-page.tsx')).LibrariesPage }),
  },
  {
    path: 'libraries/:library',
    lazy: async () => ({ Component: (await import('./routes/library/library-page.tsx')).LibraryPage }),
  },
  {
    path: 'libraries/:library/register',
    lazy: async () => ({ Component: (await import('./routes/register/register-page.tsx')).RegisterPage }),
  },
  {
    path: 'builds/:build',
    lazy: async () => ({ Component: (await import('./routes/build-page.tsx')).BuildPage }),
  },
  {
    path: 'runs/:run',
    lazy: async () => ({ Component: (await import('./routes/run/run-page.tsx')).RunPage }),
  },
  {
    path: 'runs/:run/comparison',
    lazy: async () => ({
      Component: (await import('./routes/comparison/comparison-page.tsx')).ComparisonPage,
    }),
  },
  {
    path: 'solves/:solve',
    lazy: async () => ({ Component: (await import('./routes/solve/solve-page.tsx')).SolvePage }),
  },
  {
    path: 'suites',
    lazy: async () => ({ Component: (await import('./routes/suites-page.tsx')).SuitesPage }),
  },
  {
    path: 'suites/:suite',
    lazy: async () => ({ Component: (await import('./routes/suite/suite-page.tsx')).SuitePage }),
  },
  {
    path: 'suites/:suite/cases/:case',
    lazy: async () => ({ Component: (await import('./routes/suite/case-page.tsx')).CasePage }),
  },
  {
    path: 'guide',
    lazy: async () => ({ Component: (await import('./routes/guide/guide-page.tsx')).GuidePage }),
  },
  {
    path: 'guide/:chapter',
    lazy: async () => ({ Component: (await import('./routes/guide/chapter-page.tsx')).ChapterPage }),
  },
  {
    path: 'search',
    lazy: async () => ({ Component: (await import('./routes/search-page.tsx')).SearchPage }),
  },
  {
    path: '*',
    lazy: async () => ({ Component: (await import('./routes/missing-page.tsx')).MissingPage }),
  },
];

/** For those who are not signed in: outside the frame. */
const doors: RouteObject[] = [
  {
    path: '/sign-in',
    lazy: async () => ({ Component: (await import('./routes/sign-in/sign-in-page.tsx')).SignInPage }),
  },
  {
    path: '/sign-up',
    lazy: async () => ({ Component: (await import('./routes/sign-in/sign-up-page.tsx')).SignUpPage }),
  },
  {
    path: '/forgotten-password',
    lazy: async () => ({ Component: (await import('./routes/sign-in/forgotten-page.tsx')).ForgottenPage }),
  },
  {
    path: '/reset-password',
    lazy: async () => ({ Component: (await import('./routes/sign-in/reset-page.tsx')).ResetPage }),
  },
  {
    path: '/confirm-address',
    lazy: async () => ({ Component: (await import('./routes/sign-in/confirm-page.tsx')).ConfirmPage }),
  },
  {
    path: '/invitation',
    lazy: async () => ({ Component: (await import('./routes/sign-in/invitation-page.tsx')).InvitationPage }),
  },
  {
    path: '/set-up',
    lazy: async () => ({ Component: (await import('./routes/sign-in/set-up-page.tsx')).SetUpPage }),
  },
];

if (import.meta.env.DEV) {
  pages.push({
    path: 'specimen',
    lazy: async () => ({ Component: (await import('./routes/specimen/specimen-page.tsx')).SpecimenPage }),
  });
}

export function createRouter() {
  const hydrateFallbackElement = <div className="sheet" />;
  return createBrowserRouter([
    ...doors.map((door) => ({ ...door, errorElement: <FaultPage />, hydrateFallbackElement })),
    {
      path: '/',
      element: <ShellRoute />,
      errorElement: <FaultPage />,
      hydrateFallbackElement,
      children: pages,
    },
  ]);
}
