import { routes } from '@skyberth/shared';
import { queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export const INVOICES_PER_PAGE = 50;

export const invoiceQueries = {
  all: ['invoices'] as const,
  list: (page: number) =>
    queryOptions({
      queryKey: ['invoices', 'list', page],
      queryFn: ({ signal }) => call(routes.listInvoices, { query: { page, pageSize: INVOICES_PER_PAGE }, signal }),
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: ['invoices', 'one', id],
      queryFn: ({ signal }) => call(routes.getInvoice, { params: { id }, signal }),
    }),
};
