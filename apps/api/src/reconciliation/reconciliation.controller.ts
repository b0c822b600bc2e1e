/** Translates between HTTP and reconciliation, the ledger's check, and the closing of months. */
import { Controller } from '@nestjs/common';
import { type ResponseOf, routes } from '@skyberth/shared';
import { ChargebackRepository } from '../payments/chargebacks.repository.js';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { chargebackList } from './chargeback-list.js';
import { LedgerCheckService } from './ledger-check.service.js';
import { MonthService } from './months.service.js';
import { ReconciliationService } from './reconciliation.service.js';

@Controller()
export class ReconciliationController {
  constructor(
    private readonly reconciliation: ReconciliationService,
    private readonly checks: LedgerCheckService,
    private readonly months: MonthService,
    private readonly chargebacks: ChargebackRepository,
  ) {}

  @Handles(routes.reconciliation)
  view(): ResponseOf<typeof routes.reconciliation> {
    return this.reconciliation.view();
  }

  @Handles(routes.listMovements)
  list(@Input() input: HandlerInput<typeof routes.listMovements>): ResponseOf<typeof routes.listMovements> {
    return this.reconciliation.list(input.query);
  }

  @Handles(routes.readMovements)
  read(): Promise<ResponseOf<typeof routes.readMovements>> {
    return this.reconciliation.read();
  }

  @Handles(routes.importMovements)
  import(@Input() input: HandlerInput<typeof routes.importMovements>): ResponseOf<typeof routes.importMovements> {
    return this.reconciliation.importFile(input.caller, input.body.text);
  }

  @Handles(routes.resolveMovement)
  resolve(
    @Input() input: HandlerInput<typeof routes.resolveMovement>,
  ): Promise<ResponseOf<typeof routes.resolveMovement>> {
    return this.reconciliation.resolve(input.caller, input.params.id, input.body);
  }

  @Handles(routes.listChargebacks)
  listChargebacks(
    @Input() input: HandlerInput<typeof routes.listChargebacks>,
  ): ResponseOf<typeof routes.listChargebacks> {
    return chargebackList(this.chargebacks, input.query);
  }

  @Handles(routes.listMonths)
  listMonths(): ResponseOf<typeof routes.listMonths> {
    return this.months.list();
  }

  @Handles(routes.closeMonth)
  closeMonth(@Input() input: HandlerInput<typeof routes.closeMonth>): ResponseOf<typeof routes.closeMonth> {
    return this.months.close(input.caller, input.params.month);
  }

  @Handles(routes.ledgerCheck)
  check(): ResponseOf<typeof routes.ledgerCheck> {
    return { check: this.checks.last() };
  }

  @Handles(routes.runLedgerCheck)
  async runCheck(): Promise<ResponseOf<typeof routes.runLedgerCheck>> {
    await this.checks.run();
    return { check: this.checks.last() };
  }

  @Handles(routes.systemLedgerCheck)
  systemCheck(): ResponseOf<typeof routes.systemLedgerCheck> {
    return this.checks.lastForSystem();
  }
}
