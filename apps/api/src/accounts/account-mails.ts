/** The mails about accounts, as plain functions: who gets what to read. */
import { type MailBody, mailBody } from '../mail/mail-body.js';

export interface AccountMail extends MailBody {
  readonly subject: string;
}

export const verifyMail = (name: string, url: string): AccountMail => ({
  subject: 'Confirm your e-mail address',
  ...mailBody({
    title: 'Confirm your e-mail address',
    paragraphs: [
      `Welcome aboard, ${name}. Open the link to confirm that this address is yours. It works for three days.`,
    ],
    action: { label: 'Confirm the address', url },
    notes: [
      'You get this mail because someone signed up to Skyberth with this address. If it was not you, do nothing.',
    ],
  }),
});

export const resetMail = (name: string, url: string): AccountMail => ({
  subject: 'Set a new password',
  ...mailBody({
    title: 'Set a new password',
    paragraphs: [`${name}, open the link to set a new password. It works for one hour and once.`],
    action: { label: 'Set a password', url },
    notes: ['You get this mail because someone asked for it on the sign-in page. If it was not you, do nothing.'],
  }),
});

export const inviteMail = (name: string, organisation: string, url: string): AccountMail => ({
  subject: `${organisation} invites you to Skyberth`,
  ...mailBody({
    title: `${organisation} invites you to Skyberth`,
    paragraphs: [
      `${name}, you have been invited to work for ${organisation} on Skyberth, where contact time on ground-station ` +
        'antennas is bought and sold. Open the link to set a password. It works for seven days.',
    ],
    action: { label: 'Accept and set a password', url },
    notes: ['If you did not expect this, do nothing: without a password nobody can sign in.'],
  }),
});

export const addedMail = (name: string, organisation: string, url: string): AccountMail => ({
  subject: `You now belong to ${organisation}`,
  ...mailBody({
    title: `You now belong to ${organisation}`,
    paragraphs: [`${name}, a manager has added you to ${organisation}. Sign in as before and switch to it at the top.`],
    action: { label: 'Open Skyberth', url },
  }),
});

export const passwordChangedMail = (name: string, url: string): AccountMail => ({
  subject: 'Your password was changed',
  ...mailBody({
    title: 'Your password was changed',
    paragraphs: [`${name}, your password was changed just now and every session was ended.`],
    action: { label: 'It was not me: set another', url },
  }),
});
