/** Translates between HTTP and files. */
import { Controller, Res, StreamableFile } from '@nestjs/common';
import { type AttachedFile, routes } from '@skyberth/shared';
import type { Response } from 'express';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { FilesService } from './files.service.js';

@Controller()
export class FilesController {
  constructor(private readonly files: FilesService) {}

  @Handles(routes.uploadFile)
  upload(@Input() input: HandlerInput<typeof routes.uploadFile>): Promise<AttachedFile> {
    return this.files.upload(input.caller, input.query.name, input.body);
  }

  /** Somebody else's bytes: saved, never shown by the browser in our name, hence without their own media type. */
  @Handles(routes.downloadFile)
  async download(
    @Input() input: HandlerInput<typeof routes.downloadFile>,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile> {
    const { file, bytes } = await this.files.download(input.caller, input.params.id);
    response.setHeader('Cache-Control', 'private, no-store');
    response.setHeader('X-Content-Type-Options', 'nosniff');
    response.setHeader('Content-Security-Policy', "default-src 'none'; sandbox");
    return new StreamableFile(bytes, {
      disposition: attachment(file.name),
      length: bytes.byteLength,
    });
  }
}

/** RFC 6266 with the encoding of RFC 8187, and a plain name beside it for old programs. */
function attachment(name: string): string {
  const plain = name.replace(/[^\x20-\x7e]|[%\\"]/g, '_');
  const encoded = encodeURIComponent(name).replace(/['()*]/g, (mark) => `%${mark.charCodeAt(0).toString(16)}`);
  return `attachment; filename="${plain}"; filename*=UTF-8''${encoded}`;
}
