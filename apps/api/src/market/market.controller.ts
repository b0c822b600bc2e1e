/** Translates between HTTP and the market. */
import { Readable } from 'node:stream';
import { Controller, Res, StreamableFile } from '@nestjs/common';
import { type PassDetail, type ResponseOf, routes } from '@skyberth/shared';
import type { Response } from 'express';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { MarketService } from './market.service.js';

@Controller()
export class MarketController {
  constructor(private readonly market: MarketService) {}

  @Handles(routes.listMarketStations)
  stations(): ResponseOf<typeof routes.listMarketStations> {
    return this.market.stations();
  }

  /** The answer can be megabytes, so it leaves as the bytes that the engine made. */
  @Handles(routes.searchPasses)
  async search(
    @Input() input: HandlerInput<typeof routes.searchPasses>,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile> {
    const pieces = await this.market.search(input.caller.organisationId, input.body, gone(response));
    const length = pieces.reduce((sum, piece) => sum + piece.byteLength, 0);
    return new StreamableFile(Readable.from(pieces), { type: 'application/json; charset=utf-8', length });
  }

  @Handles(routes.searchProgress)
  progress(@Input() input: HandlerInput<typeof routes.searchProgress>): ResponseOf<typeof routes.searchProgress> {
    return this.market.progress(input.caller.organisationId, input.params.searchId);
  }

  @Handles(routes.passDetail)
  detail(@Input() input: HandlerInput<typeof routes.passDetail>): Promise<PassDetail> {
    return this.market.detail(input.caller.organisationId, input.body);
  }
}

/** Aborted when the asker hangs up before the answer is complete, so that nobody computes for nobody. */
function gone(response: Response): AbortSignal {
  const controller = new AbortController();
  response.once('close', () => {
    if (!response.writableFinished) controller.abort();
  });
  return controller.signal;
}
