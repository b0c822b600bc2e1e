/** Makes sure that the marketplace's own organisation exists as configured, and that its first staff are invited. */
import { Inject, Injectable, type OnModuleInit } from '@nestjs/common';
import type { SkyberthDatabase } from '@skyberth/drizzle';
import { AuditService } from '../platform/audit.service.js';
import { CLOCK, type ClockPort } from '../platform/clock.js';
import { CONFIG, type Config } from '../platform/config.js';
import { DATABASE } from '../platform/database.module.js';
import { newId } from '../platform/ids.js';
import { type Db, write } from '../platform/transaction.js';
import { MailedLinksService } from './mailed-links.service.js';
import { OrganisationsRepository } from './organisations.repository.js';
import { PeopleRepository } from './people.repository.js';

@Injectable()
export class MarketplaceStarter implements OnModuleInit {
  constructor(
    @Inject(DATABASE) private readonly db: SkyberthDatabase,
    @Inject(CONFIG) private readonly config: Config,
    @Inject(CLOCK) private readonly clock: ClockPort,
    private readonly organisations: OrganisationsRepository,
    private readonly people: PeopleRepository,
    private readonly links: MailedLinksService,
    private readonly audit: AuditService,
  ) {}

  onModuleInit(): void {
    write(this.db, (tx) => {
      const organisationId = this.ensureOrganisation(tx);
      for (const { email, role } of this.config.firstStaff) this.ensureMember(tx, organisationId, email, role);
    });
  }

  private ensureOrganisation(tx: Db): string {
    const present = this.organisations.staff(tx);
    const wanted = this.config.marketplace;
    if (!present) {
      const id = newId();
      this.organisations.add(tx, { id, kind: 'staff', ...wanted, createdMs: this.clock.nowMs() });
      return id;
    }
    const { name, address, vatNumber, billingEmail } = present;
    if (JSON.stringify({ name, address, vatNumber, billingEmail }) !== JSON.stringify(inOrder(wanted))) {
      this.organisations.change(tx, present.id, wanted);
    }
    return present.id;
  }

  private ensureMember(tx: Db, organisationId: string, email: string, role: 'admin' | 'finance'): void {
    const known = this.people.byEmail(tx, email);
    if (known && this.organisations.member(tx, organisationId, known.id)) return;
    const createdMs = this.clock.nowMs();
    const person = known ?? { id: newId(), name: email.split('@')[0] ?? email, email, passwordHash: null };
    if (!known) this.people.add(tx, { ...person, createdMs });
    this.organisations.addMember(tx, { personId: person.id, organisationId, role, createdMs });
    if (person.passwordHash === null) this.links.sendInvite(tx, person, this.config.marketplace.name);
    this.audit.record(tx, { caller: null, action: 'staff.invite', subject: `person:${person.id}`, data: { role } });
  }
}

const inOrder = ({ name, address, vatNumber, billingEmail }: Config['marketplace']) => ({
  name,
  address,
  vatNumber,
  billingEmail,
});
