import type { Letter } from '../../platform/mail/mail-transport';

export interface InvitationLetter {
  readonly to: string;
  readonly name: string;
  readonly invitedBy: string;
  readonly organisation: string;
  readonly link: string;
  readonly expiresAt: Date;
}

/** `2026-12-08 14:05 UTC`, the same for readers everywhere. */
function momentText(moment: Date): string {
  return `${moment.toISOString().slice(0, 16).replace('T', ' ')} UTC`;
}

export function invitationLetter(invitation: InvitationLetter): Letter {
  const { to, name, invitedBy, organisation, link, expiresAt } = invitation;
  return {
    to,
    subject: `Invitation to ${organisation}`,
    text: [
      `${name},`,
      `${invitedBy} invites you to Tareline, where ${organisation} proves which payloads its machines carry.`,
      `Choose your password here:\n${link}`,
      `The link works once, until ${momentText(expiresAt)}. If you expected no invitation, do nothing.`,
    ].join('\n\n'),
  };
}
