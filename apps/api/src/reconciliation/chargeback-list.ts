/** Chargebacks as they cross the wire. */
import type { ResponseOf, routes } from '@skyberth/shared';
import type { ChargebackRepository } from '../payments/chargebacks.repository.js';

export function chargebackList(
  repository: ChargebackRepository,
  query: { page: number; pageSize: number },
): ResponseOf<typeof routes.listChargebacks> {
  const { rows, total } = repository.page(query);
  const items = rows.map((row) => ({
    id: row.id,
    bookingId: row.bookingId,
    bookingNumber: row.bookingNumber,
    operatorName: row.operatorName,
    ownerName: row.ownerName,
    amountMinor: row.amountMinor,
    reservedMinor: row.reservedMinor,
    currency: row.currency,
    reason: row.reason,
    state: row.state,
    openedUtc: new Date(row.openedMs).toISOString(),
    closedUtc: row.closedMs === null ? null : new Date(row.closedMs).toISOString(),
  }));
  return { items, total, page: query.page, pageSize: query.pageSize };
}
