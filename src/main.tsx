import './styles/app.css';
import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router/dom';
import { forgetPerson } from './features/session/session.queries.ts';
import { createQueryClient } from './lib/query-client.ts';
import { applyScheme, readScheme } from './lib/scheme.ts';
import { createRouter } from './router.tsx';

applyScheme(readScheme());

const root = document.getElementById('root');
if (root === null) throw new Error('The page has no root element.');
createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={createQueryClient(forgetPerson)}>
      <RouterProvider router={createRouter()} />
    </QueryClientProvider>
  </StrictMode>,
);
