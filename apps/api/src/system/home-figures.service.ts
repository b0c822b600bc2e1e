/** Money at a glance and the first steps of an organisation, for its home page. */
import { Inject, Injectable } from '@nestjs/common';
import { can, type HomeView, type Principal } from '@skyberth/shared';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { HomeFiguresRepository } from './home-figures.repository.js';

@Injectable()
export class HomeFiguresService {
  constructor(
    private readonly repository: HomeFiguresRepository,
    @Inject(CLOCK) private readonly clock: ClockPort,
  ) {}

  money(caller: Principal): HomeView['money'] {
    const { organisationId, organisationKind } = caller;
    const nowMs = this.clock.nowMs();
    const monthMs = startOfMonth(nowMs);
    if (organisationKind === 'operator')
      return [
        {
          label: 'Secured for contacts to come',
          note: 'VAT included; charged once each has been flown',
          amounts: this.repository.operatorTotal(organisationId, [
            'awaiting owner',
            'confirmed',
            'under way',
            'reporting',
          ]),
        },
        {
          label: 'Invoiced this month',
          note: 'VAT included, less credit notes',
          amounts: this.repository.invoiced(organisationId, monthMs),
        },
      ];
    if (organisationKind === 'owner')
      return [
        {
          label: 'Sold and still to fly',
          note: 'what buyers pay, without VAT',
          amounts: this.repository.ownerTotal(organisationId, ['confirmed', 'under way'], nowMs),
        },
        {
          label: 'Flown and settled this month',
          note: 'what buyers paid, without VAT and before the fee',
          amounts: this.repository.ownerTotal(organisationId, ['settled'], monthMs),
        },
      ];
    if (!can(caller, 'ledger.read')) return [];
    return [
      {
        label: 'Invoiced this month',
        note: 'VAT included, less credit notes',
        amounts: this.repository.invoiced(null, monthMs),
      },
    ];
  }

  /** How to begin; empty once all of it is done. */
  firstSteps({ organisationKind, organisationId }: Principal): HomeView['firstSteps'] {
    const steps =
      organisationKind === 'operator'
        ? this.operatorSteps(organisationId)
        : organisationKind === 'owner'
          ? this.ownerSteps(organisationId)
          : [];
    return steps.every(({ done }) => done) ? [] : steps;
  }

  private operatorSteps(id: string): HomeView['firstSteps'] {
    const has = this.repository;
    return [
      { sentence: 'Paste element sets', path: '/spacecraft/elements', done: has.hasElements(id) },
      { sentence: 'Describe the radios of a spacecraft', path: '/spacecraft', done: has.hasRadio(id) },
      { sentence: 'Find a pass and hold it', path: '/find-time', done: has.hasBought(id) },
    ];
  }

  private ownerSteps(id: string): HomeView['firstSteps'] {
    const has = this.repository;
    return [
      { sentence: 'Add a station', path: '/stations/new', done: has.hasStation(id) },
      { sentence: 'Add an antenna with its horizon and bands', path: '/stations', done: has.hasAntenna(id) },
      { sentence: 'Set a price', path: '/stations', done: has.hasPrice(id) },
      { sentence: 'Have the station approved', path: '/stations', done: has.hasStation(id, 'approved') },
      { sentence: 'Put the antenna on sale', path: '/stations', done: has.hasAntenna(id, 'on sale') },
    ];
  }
}

const startOfMonth = (nowMs: number): number => {
  const now = new Date(nowMs);
  return Date.UTC(now.getUTCFullYear(), now.getUTCMonth(), 1);
};
