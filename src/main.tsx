import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { QueryClientProvider } from '@tanstack/react-query';
import { RouterProvider } from 'react-router-dom';
import { createQueryClient } from './api/queryClient.ts';
import { say } from './components/messages.ts';
import { createRouter } from './routes/router.tsx';
import { followTheme } from './theme/theme.ts';
import './styles/index.css';

const place = document.getElementById('root');
if (!place) throw new Error('index.html has no element #root');

followTheme();
const queryClient = createQueryClient(() =>
  say('Your session has ended. Sign in again to go on; what you have written stays here.'),
);

createRoot(place).render(
  <StrictMode>
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={createRouter(queryClient)} />
    </QueryClientProvider>
  </StrictMode>,
);
