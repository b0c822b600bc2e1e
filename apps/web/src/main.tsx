/** Starts the page. */
import '@mantine/core/styles.css';
import '@mantine/dates/styles.css';
import '@mantine/notifications/styles.css';
import '@fontsource-variable/manrope';
import './theme/global.css';
import { MantineProvider } from '@mantine/core';
import { ModalsProvider } from '@mantine/modals';
import { Notifications } from '@mantine/notifications';
import { QueryClientProvider } from '@tanstack/react-query';
import { StrictMode } from 'react';
import { createRoot } from 'react-dom/client';
import { RouterProvider } from 'react-router-dom';
import { createQueryClient } from './app/query-client.js';
import { createRouter } from './app/router.js';
import { cssVariablesResolver, theme } from './theme/theme.js';

const root = document.getElementById('root');
if (!root) throw new Error('The page has no root element.');
const client = createQueryClient();

createRoot(root).render(
  <StrictMode>
    <MantineProvider theme={theme} cssVariablesResolver={cssVariablesResolver} defaultColorScheme="auto">
      <QueryClientProvider client={client}>
        <ModalsProvider>
          <Notifications position="top-right" limit={3} />
          <RouterProvider router={createRouter(client)} />
        </ModalsProvider>
      </QueryClientProvider>
    </MantineProvider>
  </StrictMode>,
);
