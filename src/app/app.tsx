import { QueryClientProvider } from '@tanstack/react-query';
import { useState } from 'react';
import { RouterProvider } from 'react-router-dom';
import { makeQueryClient } from './query-client.ts';
import { makeRouter } from './router.tsx';

export function App() {
  const [client] = useState(makeQueryClient);
  const [router] = useState(makeRouter);
  return (
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  );
}
