/** Attachments travel as references and are made when the mail leaves, so that the outbox holds no files. */
import { Injectable } from '@nestjs/common';

export interface AttachmentRef {
  readonly kind: string;
  readonly id: string;
}
export type AttachmentResolver = (id: string) => Buffer | Promise<Buffer>;

@Injectable()
export class MailAttachments {
  private readonly resolvers = new Map<string, AttachmentResolver>();

  /** Says who makes the files of a kind, such as `invoice`; called once a kind, when modules start. */
  register(kind: string, resolver: AttachmentResolver): void {
    if (this.resolvers.has(kind)) throw new Error(`Two resolvers for attachments of kind ${kind}.`);
    this.resolvers.set(kind, resolver);
  }

  async resolve(ref: AttachmentRef): Promise<Buffer> {
    const resolver = this.resolvers.get(ref.kind);
    if (!resolver) throw new Error(`Nobody makes attachments of kind ${ref.kind}.`);
    return resolver(ref.id);
  }
}
