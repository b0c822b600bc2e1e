/** The mails about the approval of stations. */
import { type MailBody, mailBody } from '../mail/mail-body.js';

export type Decision = 'approve' | 'refuse' | 'suspend';

const WORDS: Readonly<Record<Decision, { readonly done: string; readonly next: string }>> = {
  approve: { done: 'approved', next: 'Its antennas can be sold as soon as you put them on sale.' },
  refuse: { done: 'refused', next: 'Mend what the reason names and ask for approval again.' },
  suspend: { done: 'suspended', next: 'Nothing new is sold over it. Contacts already sold stay as they are.' },
};

export function decisionMail(
  station: string,
  decision: Decision,
  note: string,
  url: string,
): MailBody & { readonly subject: string } {
  const { done, next } = WORDS[decision];
  const title = `${station} was ${done}`;
  return {
    subject: title,
    ...mailBody({
      title,
      paragraphs: [next],
      facts: [['Reason', note]],
      action: { label: 'Open the station', url },
      notes: ['Approval here is no licence: spectrum rights and safety remain with the station and its authorities.'],
    }),
  };
}
