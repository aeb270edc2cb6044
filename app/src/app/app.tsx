import { BlueprintProvider } from '@blueprintjs/core';
import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { RouterProvider } from 'react-router-dom';
import { createQueryClient } from '#lib/query-client.ts';
import { createRouter } from './router.tsx';

const client = createQueryClient();
const router = createRouter(client);

export function App() {
  return (
    <StrictMode>
      <QueryClientProvider client={client}>
        <BlueprintProvider>
          <RouterProvider router={router} />
        </BlueprintProvider>
      </QueryClientProvider>
    </StrictMode>
  );
}
