/** The mails about the standing of an organisation. */
import { type MailBody, mailBody } from '../mail/mail-body.js';

const WORDS = {
  suspend: {
    title: (name: string) => `${name} is suspended`,
    next: 'Its people can still sign in and read, report contacts and answer messages. Nothing new is bought or sold. Contacts already sold stay as they are.',
  },
  reinstate: {
    title: (name: string) => `${name} is in good standing again`,
    next: 'Everything works as before.',
  },
} as const;

export function standingMail(
  name: string,
  what: keyof typeof WORDS,
  reason: string,
  url: string,
): MailBody & { readonly subject: string } {
  const words = WORDS[what];
  const title = words.title(name);
  return {
    subject: title,
    ...mailBody({
      title,
      paragraphs: [words.next],
      facts: [['Reason', reason]],
      action: { label: 'Open Skyberth', url },
      notes: ['Answer this mail if you think that this is a mistake.'],
    }),
  };
}
