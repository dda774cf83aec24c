import { QueryClientProvider } from '@tanstack/react-query';
import { PrimeReactProvider } from 'primereact/api';
import { RouterProvider } from 'react-router-dom';
import { queryClient } from '../shared/api/query-client';
import { AuthProvider } from '../shared/session/auth';
import { ThemeProvider } from '../shared/theme/theme';
import { ToastProvider } from '../shared/ui/toast';
import { passThrough } from './pass-through';
import { router } from './router';

export function App() {
  return (
    <PrimeReactProvider value={{ unstyled: true, pt: passThrough }}>
      <QueryClientProvider client={queryClient}>
        <ThemeProvider>
          <AuthProvider>
            <ToastProvider>
              <RouterProvider router={router} />
            </ToastProvider>
          </AuthProvider>
        </ThemeProvider>
      </QueryClientProvider>
    </PrimeReactProvider>
  );
}
