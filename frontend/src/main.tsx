import '@fontsource/work-sans/latin-400.css';
import '@fontsource/work-sans/latin-500.css';
import '@fontsource/work-sans/latin-600.css';
import '@fontsource/work-sans/latin-ext-400.css';
import '@fontsource/work-sans/latin-ext-500.css';
import '@fontsource/work-sans/latin-ext-600.css';
import './styles/base.css';
import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { createBrowserRouter, RouterProvider } from 'react-router-dom';
import { makeQueryClient } from './api/query-client.ts';
import { routes, signInPage } from './router.tsx';

const queryClient = makeQueryClient(() => {
  queryClient.clear();
  const { pathname, search } = router.state.location;
  void router.navigate(signInPage(pathname + search), { replace: true });
});
const router = createBrowserRouter(routes(queryClient));

const root = document.getElementById('root');
if (root === null) throw new Error('The page has no element with the id root');
createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  </StrictMode>,
);
