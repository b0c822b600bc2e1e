import { Controller } from '@nestjs/common';
import { type HomeView, openApiDocument, routes, type SystemView } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { HomeService } from './home.service.js';
import { SystemService } from './system.service.js';
import { VERSION } from './version.js';

@Controller()
export class SystemController {
  private readonly document = openApiDocument(routes, VERSION);

  constructor(
    private readonly system: SystemService,
    private readonly home: HomeService,
  ) {}

  @Handles(routes.health)
  health(): Promise<{ status: 'ok' }> {
    return this.system.health();
  }

  @Handles(routes.openapi)
  openapi(): unknown {
    return this.document;
  }

  @Handles(routes.home)
  homeView(@Input() input: HandlerInput<typeof routes.home>): HomeView {
    return this.home.view(input.caller);
  }

  @Handles(routes.system)
  systemView(): Promise<SystemView> {
    return this.system.view();
  }
}
