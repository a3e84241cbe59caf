import { QueryClientProvider } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { I18nProvider } from 'react-aria-components';
import { queryClient } from '../lib/query-client';
import { Toasts } from '../ui/toast';
import { ConnectionNotice } from './connection-notice';

/** What every screen relies on: the cache of answers, the language, messages, word of a lost connection. */
export function Providers({ children }: { children: ReactNode }) {
  return (
    <I18nProvider locale="en-GB">
      <QueryClientProvider client={queryClient}>
        {children}
        <ConnectionNotice />
        <Toasts />
      </QueryClientProvider>
    </I18nProvider>
  );
}
