import { routes } from '@skyberth/shared';
import { keepPreviousData, queryOptions } from '@tanstack/react-query';
import { call } from '../../lib/api-client.js';

export const PAGE_SIZE = 25;

export const invoiceQueries = {
  list: (page: number) =>
    queryOptions({
      queryKey: ['invoices', 'list', page],
      queryFn: ({ signal }) => call(routes.listInvoices, { query: { page, pageSize: PAGE_SIZE }, signal }),
      placeholderData: keepPreviousData,
    }),
  one: (id: string) =>
    queryOptions({
      queryKey: ['invoices', 'one', id],
      queryFn: ({ signal }) => call(routes.getInvoice, { params: { id }, signal }),
    }),
};
