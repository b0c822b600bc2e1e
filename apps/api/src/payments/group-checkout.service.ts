/**
 * Paying for a group. Each booking has a reservation of its own, because each is charged after its own contact; nothing is
 * sold before all of them stand (`BookingSale.fundsSecured`), and the end of the hold lets every one of them go.
 */
import { Injectable } from '@nestjs/common';
import type { BodyOf, Principal, ResponseOf, routes } from '@skyberth/shared';
import { BookingGroupRepository } from '../bookings/booking-groups.repository.js';
import { DomainError } from '../platform/domain-error.js';
import { CheckoutService } from './checkout.service.js';

type Result = ResponseOf<typeof routes.checkoutGroup>;

@Injectable()
export class GroupCheckoutService {
  constructor(
    private readonly groups: BookingGroupRepository,
    private readonly checkouts: CheckoutService,
  ) {}

  /**
   * Safe to repeat: what is reserved already stays so. Throws what a single checkout throws; after `card-declined` nothing is
   * sold, and another card may be tried until the hold ends. Where the bank wants to ask the buyer, answers where to go; call
   * again afterwards.
   */
  async pay(caller: Principal, groupId: string, wish: BodyOf<typeof routes.checkoutGroup>): Promise<Result> {
    this.groups.ofOperator(caller.organisationId, groupId);
    const open = this.groups.members(groupId).filter(({ isSecured }) => !isSecured);
    if (open.some(({ booking }) => booking.state !== 'held' && booking.state !== 'lapsed'))
      throw new DomainError('wrong-state', 'The group was let go; there is nothing to pay.');
    for (const { booking } of open) {
      // A payment page keeps the card for the bookings that follow.
      const result = await this.checkouts.payInGroup(caller, booking.id, {
        ...wish,
        saveCard: wish.savedCardId === null,
      });
      if (result.kind === 'redirect') return result;
    }
    return { kind: 'processing' };
  }
}
