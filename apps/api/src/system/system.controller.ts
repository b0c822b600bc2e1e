import { Controller } from '@nestjs/common';
import { openApiDocument, routes } from '@skyberth/shared';
import { Handles } from '../platform/contract.js';
import { VERSION } from './version.js';

@Controller()
export class SystemController {
  private readonly document = openApiDocument(routes, VERSION);

  @Handles(routes.openapi)
  openapi(): unknown {
    return this.document;
  }
}
