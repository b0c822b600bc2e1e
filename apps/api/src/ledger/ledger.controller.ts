/** Translates between HTTP and the ledger. */
import { Readable } from 'node:stream';
import { Controller, StreamableFile } from '@nestjs/common';
import { type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { LedgerFiles } from './ledger-files.js';
import { LedgerReading } from './ledger-reading.service.js';

@Controller()
export class LedgerController {
  constructor(
    private readonly ledger: LedgerReading,
    private readonly files: LedgerFiles,
  ) {}

  @Handles(routes.journal)
  journal(@Input() input: HandlerInput<typeof routes.journal>): ResponseOf<typeof routes.journal> {
    return this.ledger.journal(input.query);
  }

  @Handles(routes.ledgerLines)
  lines(@Input() input: HandlerInput<typeof routes.ledgerLines>): ResponseOf<typeof routes.ledgerLines> {
    return this.ledger.lines(input.query);
  }

  @Handles(routes.balances)
  balances(): ResponseOf<typeof routes.balances> {
    return this.ledger.balances();
  }

  @Handles(routes.partyBalances)
  parties(@Input() input: HandlerInput<typeof routes.partyBalances>): ResponseOf<typeof routes.partyBalances> {
    return this.ledger.parties(input.query);
  }

  @Handles(routes.ledgerMonths)
  months(@Input() input: HandlerInput<typeof routes.ledgerMonths>): ResponseOf<typeof routes.ledgerMonths> {
    return this.ledger.months(input.query);
  }

  @Handles(routes.ledgerFile)
  file(@Input() input: HandlerInput<typeof routes.ledgerFile>): StreamableFile {
    const { file } = input.params;
    const { month } = input.query;
    const name = file.replace('.csv', `-${month}.csv`);
    return new StreamableFile(Readable.from(this.files.lines(file, month), { objectMode: false }), {
      type: 'text/csv; charset=utf-8',
      disposition: `attachment; filename="${name}"`,
    });
  }
}
