/** The application: the platform and one module for each feature. */
import { type DynamicModule, Module } from '@nestjs/common';
import { AccountsModule } from './accounts/accounts.module.js';
import { ApiKeysModule } from './api-keys/api-keys.module.js';
import { AvailabilityModule } from './availability/availability.module.js';
import { BookingsModule } from './bookings/bookings.module.js';
import { CalendarFeedsModule } from './calendar-feeds/calendar-feeds.module.js';
import { ClearancesModule } from './clearances/clearances.module.js';
import { CreditModule } from './credit/credit.module.js';
import { DisputesModule } from './disputes/disputes.module.js';
import { DriftModule } from './drift/drift.module.js';
import { FilesModule } from './files/files.module.js';
import { InvoicesModule } from './invoices/invoices.module.js';
import { JobsModule } from './jobs/jobs.module.js';
import { LedgerModule } from './ledger/ledger.module.js';
import { LiveModule } from './live/live.module.js';
import { MailModule } from './mail/mail.module.js';
import { MarketModule } from './market/market.module.js';
import { MessagesModule } from './messages/messages.module.js';
import { OutboxModule } from './outbox/outbox.module.js';
import { OversightModule } from './oversight/oversight.module.js';
import { PaymentsModule } from './payments/payments.module.js';
import { PayoutsModule } from './payouts/payouts.module.js';
import { PlanningModule } from './planning/planning.module.js';
import type { ClockPort } from './platform/clock.js';
import type { Config } from './platform/config.js';
import { PlatformModule } from './platform/platform.module.js';
import { ReconciliationModule } from './reconciliation/reconciliation.module.js';
import { RunSheetModule } from './run-sheet/run-sheet.module.js';
import { SpacecraftModule } from './spacecraft/spacecraft.module.js';
import { StandbyModule } from './standby/standby.module.js';
import { StationsModule } from './stations/stations.module.js';
import { SystemModule } from './system/system.module.js';

@Module({})
export class AppModule {
  static forRoot(config: Config, clock: ClockPort): DynamicModule {
    return {
      module: AppModule,
      imports: [
        PlatformModule.forRoot(config, clock),
        JobsModule,
        OutboxModule,
        MailModule,
        FilesModule,
        AccountsModule,
        ApiKeysModule,
        SpacecraftModule,
        StationsModule,
        AvailabilityModule,
        BookingsModule,
        CalendarFeedsModule,
        StandbyModule,
        LiveModule,
        RunSheetModule,
        DriftModule,
        PaymentsModule,
        InvoicesModule,
        LedgerModule,
        PayoutsModule,
        ReconciliationModule,
        CreditModule,
        MarketModule,
        PlanningModule,
        ClearancesModule,
        DisputesModule,
        MessagesModule,
        OversightModule,
        SystemModule,
      ],
    };
  }
}
