/** Carries the engine's jobs out, with everything worth remembering between them. One desk for each thread. */
import type { EngineJob, OutcomeOf } from '../workers/job-types.js';
import { flightFile } from './flight-files.js';
import { Horizons } from './horizons.js';
import { MountGaps } from './mount-gaps.js';
import { nightsOf } from './nights.js';
import { onePass } from './one-pass.js';
import { OpeningHours } from './opening-hours.js';
import { PairAnswers } from './pair-answers.js';
import { PassBlocks } from './pass-blocks.js';
import { PassTexts } from './pass-text.js';
import { QuestionNames } from './sale-validity.js';
import { type SearchTools, searchPasses } from './search.js';
import { TrackTables } from './track-table.js';

export class PassDesk {
  private readonly tools: SearchTools;

  constructor() {
    const horizons = new Horizons();
    const tables = new TrackTables();
    this.tools = {
      tables,
      horizons,
      blocks: new PassBlocks(horizons, tables),
      gaps: new MountGaps(tables),
      hours: new OpeningHours(),
      names: new QuestionNames(),
      pairs: new PairAnswers(),
      texts: new PassTexts(tables),
    };
  }

  carryOut<J extends EngineJob>(job: J): OutcomeOf<J> {
    // Each branch answers with what OutcomeOf names for its job; the compiler cannot follow a generic through a switch.
    return this.answer(job) as OutcomeOf<J>;
  }

  private answer(job: EngineJob): OutcomeOf<EngineJob> {
    switch (job.kind) {
      case 'search':
        return searchPasses(job, this.tools);
      case 'pass':
        return onePass(job, this.tools);
      case 'file':
        return flightFile(job, this.tools.tables);
      case 'nights':
        return { kind: 'nights', nights: nightsOf(job.sites, job.fromMs, job.toMs) };
    }
  }
}
