import { createBrowserRouter, Navigate, type RouteObject } from 'react-router';
import { paths } from './paths.ts';
import { ShellRoute } from './routes/shell-route.tsx';

/** Pages are read when they are first opened; only the shell is in the first script. */
const pages: RouteObject[] = [
  { index: true, element: <Navigate to={paths.libraries()} replace /> },
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
];

if (import.meta.env.DEV) {
  pages.push({
    path: 'specimen',
    lazy: async () => ({ Component: (await import('./routes/specimen/specimen-page.tsx')).SpecimenPage }),
  });
}

export function createRouter() {
  return createBrowserRouter([
    { path: '/', element: <ShellRoute />, HydrateFallback: () => null, children: pages },
  ]);
}
