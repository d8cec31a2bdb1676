import { formatDateTimeUtc } from '#contract/format.ts';

export interface Letter {
  to: string;
  subject: string;
  text: string;
}

const paragraphs = (...lines: string[]): string => `${lines.join('\n\n')}\n`;

export function invitationLetter(about: {
  to: string;
  invitedBy: string;
  link: string;
  expiresAt: Date;
}): Letter {
  return {
    to: about.to,
    subject: 'Your invitation to Spinward',
    text: paragraphs(
      `${about.invitedBy} invites you to Spinward, where launch-site trade studies are written, ranked and reviewed.`,
      'Set your name and a password here:',
      about.link,
      `The link works once, until ${formatDateTimeUtc(about.expiresAt)}. If you did not expect it, leave it: no account is made without it.`,
    ),
  };
}

export function resetLetter(about: { to: string; link: string }): Letter {
  return {
    to: about.to,
    subject: 'Set a new password for Spinward',
    text: paragraphs(
      'Someone asked for a new password for this address. Set it here:',
      about.link,
      'The link works once, for an hour. If it was not you, leave it: the present password stays.',
    ),
  };
}

export function addressLetter(about: { to: string; link: string }): Letter {
  return {
    to: about.to,
    subject: 'Confirm your address for Spinward',
    text: paragraphs(
      'An account was made for this address. Confirm that it is yours:',
      about.link,
      'The link works for an hour. If it was not you, leave it: the account stays shut.',
    ),
  };
}
