import { createBrowserRouter, Navigate, type RouteObject } from 'react-router';
import { paths } from './paths.ts';
import { FaultPage } from './routes/fault-page.tsx';
import { ShellRoute } from './routes/shell-route.tsx';

/** Pages are read when they are first opened; only the shell is in the first script. */
const pages: RouteObject[] = [
  { index: true, element: <Navigate to={paths.libraries()} replace /> },
  {
    path: 'libraries',
    lazy: async () => ({ Component: (await import('./routes/libraries-page.tsx')).LibrariesPage }),
  },
  {
    path: 'libraries/:library',
    lazy: async () => ({ Component: (await import('./routes/library/library-page.tsx')).LibraryPage }),
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

if (import.meta.env.DEV) {
  pages.push({
    path: 'specimen',
    lazy: async () => ({ Component: (await import('./routes/specimen/specimen-page.tsx')).SpecimenPage }),
  });
}

export function createRouter() {
  return createBrowserRouter([
    {
      path: '/',
      element: <ShellRoute />,
      errorElement: <FaultPage />,
      hydrateFallbackElement: <div className="sheet" />,
      children: pages,
    },
  ]);
}
