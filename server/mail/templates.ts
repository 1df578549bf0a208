import type { Role } from '../../shared/permissions.ts';

export interface Mail {
  subject: string;
  text: string;
  html: string;
}

const entities: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => entities[character] ?? '');
}

/** Names come from people; a line break in one would start another line of the mail, or of its head. */
function oneLine(text: string): string {
  return text.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ').trim();
}

interface Link {
  label: string;
  address: string;
}

/** One set of paragraphs, as plain text and as HTML; everything in it is escaped here and nowhere else. */
function compose(
  subject: string,
  before: readonly string[],
  link: Link | null,
  after: readonly string[],
): Mail {
  const text = [...before, ...(link ? [`${link.label}:\n${link.address}`] : []), ...after, '— Tallyroot'];
  const paragraph = (words: string) => `<p>${escapeHtml(words)}</p>`;
  const anchor = link
    ? [`<p><a href="${escapeHtml(link.address)}">${escapeHtml(link.label)}</a></p>`, paragraph(link.address)]
    : [];
  const body = [...before.map(paragraph), ...anchor, ...after.map(paragraph), paragraph('— Tallyroot')];
  return {
    subject: oneLine(subject),
    text: `${text.join('\n\n')}\n`,
    html: `<!doctype html>\n<html lang="en"><body style="font-family:sans-serif;line-height:1.5">\n${body.join('\n')}\n</body></html>\n`,
  };
}

const notYou = 'If this was not you, there is nothing to do; nobody can go on without this mail.';

export function confirmAddressMail(name: string, address: string): Mail {
  return compose(
    'Confirm your address',
    [`Hello ${oneLine(name)},`, 'somebody has made an account at Tallyroot with this address.'],
    { label: 'Confirm that it is yours', address },
    ['The link is good for a day.', notYou],
  );
}

export function hasAccountMail(name: string, address: string): Mail {
  return compose(
    'You have an account already',
    [
      `Hello ${oneLine(name)},`,
      'somebody wanted to make an account at Tallyroot with this address, which has one already.',
    ],
    { label: 'Sign in, or ask there for a new password', address },
    ['If this was not you, there is nothing to do.'],
  );
}

export function resetPasswordMail(name: string, address: string): Mail {
  return compose(
    'A new password',
    [`Hello ${oneLine(name)},`, 'somebody has asked for a new password of your account at Tallyroot.'],
    { label: 'Choose a new password', address },
    ['The link is good for an hour, and once.', notYou],
  );
}

export function passwordChangedMail(name: string): Mail {
  return compose(
    'Your password has been changed',
    [
      `Hello ${oneLine(name)},`,
      'your password at Tallyroot is a new one now, and you are signed out everywhere else.',
    ],
    null,
    ['If this was not you, ask for a new password and tell the admin of your site.'],
  );
}

export function invitationMail(given: {
  library: string;
  role: Role;
  invitedBy: string;
  address: string;
  days: number;
}): Mail {
  const library = oneLine(given.library);
  return compose(
    `You are invited to ${library}`,
    [
      'Hello,',
      `${oneLine(given.invitedBy)} invites you to the library ${library} at Tallyroot, as ${given.role}.`,
    ],
    { label: 'Look at the invitation', address: given.address },
    [`The link is good for ${given.days} days, and for this address alone.`],
  );
}
