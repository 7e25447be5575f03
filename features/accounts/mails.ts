import { renderMail } from '@/lib/mail/layout';

/** Words of the mails that accounts send. Links carry the secret; the database holds only its hash. */

/** An invitation to an account. */
export function invitationMail(input: {
  name: string;
  inviter: string;
  dealership: string;
  role: string;
  link: string;
  days: number;
}) {
  return {
    subject: `${input.dealership} invites you to Hilum`,
    ...renderMail({
      greeting: `Hello ${input.name},`,
      paragraphs: [
        `${input.inviter} of ${input.dealership} invites you to Hilum as a ${input.role}. Hilum works out which soybean variety belongs on which field, and says why in bushels.`,
        `The link below opens your account. It is good for ${input.days} days and works once.`,
      ],
      button: { label: 'Open my account', url: input.link },
      foot: 'If you did not expect this, do nothing: no account is made without the link.',
    }),
  };
}

/** A link to choose a new password. */
export function passwordResetMail(input: { name: string; link: string; minutes: number }) {
  return {
    subject: 'Choose a new password for Hilum',
    ...renderMail({
      greeting: `Hello ${input.name},`,
      paragraphs: [
        `Somebody asked for a new password for this address. The link is good for ${input.minutes} minutes and works once.`,
      ],
      button: { label: 'Choose a new password', url: input.link },
      foot: 'If it was not you, do nothing: your password stays as it is.',
    }),
  };
}

/** Said after a password was changed, so that an owner learns of a change that was not theirs. */
export function passwordChangedMail(input: { name: string; address: string }) {
  return {
    subject: 'Your Hilum password was changed',
    ...renderMail({
      greeting: `Hello ${input.name},`,
      paragraphs: [
        'Your password was changed just now and every other session was signed out.',
        'If it was not you, choose a new password at once.',
      ],
      button: { label: 'Choose a new password', url: `${input.address}/forgot-password` },
    }),
  };
}
