import { Controller } from '@nestjs/common';
import { type Message, type ResponseOf, routes } from '@skyberth/shared';
import { type HandlerInput, Handles, Input } from '../platform/contract.js';
import { MessagesService } from './messages.service.js';

@Controller()
export class MessagesController {
  constructor(private readonly messages: MessagesService) {}

  @Handles(routes.listThreads)
  threads(@Input() input: HandlerInput<typeof routes.listThreads>): ResponseOf<typeof routes.listThreads> {
    return this.messages.threads(input.caller, input.query);
  }

  @Handles(routes.listMessages)
  list(@Input() input: HandlerInput<typeof routes.listMessages>): { items: Message[] } {
    return this.messages.list(input.caller, input.params.id);
  }

  @Handles(routes.sendMessage)
  send(@Input() input: HandlerInput<typeof routes.sendMessage>): Message {
    return this.messages.send(input.caller, input.params.id, input.body);
  }

  @Handles(routes.readMessages)
  read(@Input() input: HandlerInput<typeof routes.readMessages>): { ok: true } {
    return this.messages.read(input.caller, input.params.id, input.body.messageId);
  }
}
