import { QueryClientProvider } from '@tanstack/react-query';
import { setNonce } from 'get-nonce';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { makeRouter } from './app/router.tsx';
import { makeQueryClient } from './lib/query-client.ts';
import { meQuery } from './lib/session.ts';
import { watchTheme } from './lib/theme.ts';
import './index.css';

// Styles that dialogs add at run time carry the answer's nonce, or the content security policy refuses them.
const nonce = document.querySelector<HTMLMetaElement>('meta[name="csp-nonce"]')?.content;
if (nonce) setNonce(nonce);
watchTheme();

// Whoever's session has ended is asked to sign in again by the shell, which watches who is signed in.
const client = makeQueryClient(() => client.setQueryData(meQuery.queryKey, null));
const root = document.getElementById('root');
if (!root) throw new Error('index.html has no #root');
createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={client}>
      <RouterProvider router={makeRouter(client)} />
    </QueryClientProvider>
  </StrictMode>,
);
