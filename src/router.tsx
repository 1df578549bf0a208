import { createBrowserRouter, Navigate, type RouteObject } from 'react-router';
import { Shell } from './components/sheet/shell.tsx';
import { paths } from './paths.ts';

/** Pages are read when they are first opened; only the shell is in the first script. */
const pages: RouteObject[] = [{ index: true, element: <Navigate to={paths.libraries()} replace /> }];

if (import.meta.env.DEV) {
  pages.push({
    path: 'specimen',
    lazy: async () => ({ Component: (await import('./routes/specimen/specimen-page.tsx')).SpecimenPage }),
  });
}

export function createRouter() {
  return createBrowserRouter([{ path: '/', element: <Shell />, children: pages }]);
}
