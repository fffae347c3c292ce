import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { RouterProvider } from 'react-router-dom';
import { ApiError, keepAccessToken, whenSignedOut } from '@/lib/api';
import { sessionQuery } from '@/queries/session';
import { router } from './router';

const client = new QueryClient({
  defaultOptions: {
    queries: {
      staleTime: 10_000,
      // a refusal will be the same next time; only an absent server is asked again
      retry: (count, error) =>
        count < 2 && error instanceof ApiError && (error.status === 0 || error.status === 503),
    },
    mutations: { retry: false },
  },
});

whenSignedOut(() => {
  keepAccessToken(null);
  client.setQueryData(sessionQuery.queryKey, null);
});

export function App() {
  return (
    <QueryClientProvider client={client}>
      <RouterProvider router={router} />
    </QueryClientProvider>
  );
}
