/** The mails, each as subject, lines and one link. Plain text and HTML are made from the same words. */
interface Mail {
  readonly subject: string;
  readonly lines: readonly string[];
  readonly link?: { readonly label: string; readonly url: string };
}

type Content = Readonly<Record<string, string>>;

const templates = {
  verify: (c: Content): Mail => ({
    subject: 'Confirm your e-mail address',
    lines: [`Hello ${c.name},`, 'Confirm that this is your address. The link works once, for 24 hours.'],
    link: { label: 'Confirm my address', url: c.url! },
  }),
  'sign-up-again': (c: Content): Mail => ({
    subject: 'You already have an account',
    lines: [
      `Hello ${c.name},`,
      'Somebody, perhaps you, tried to sign up with this address. You already have an account with it.',
      'Sign in as usual. If you do not know your password any more, ask for a new one.',
    ],
    link: { label: 'Sign in', url: c.url! },
  }),
  reset: (c: Content): Mail => ({
    subject: 'Choose a new password',
    lines: [
      `Hello ${c.name},`,
      'You asked for a new password. The link works once, for one hour.',
      'If you did not ask, leave this mail alone: nothing has changed.',
    ],
    link: { label: 'Choose a new password', url: c.url! },
  }),
  'change-email': (c: Content): Mail => ({
    subject: 'Confirm your new e-mail address',
    lines: [
      `Hello ${c.name},`,
      'Confirm that you want to sign in with this address from now on. The link works once, for 24 hours.',
    ],
    link: { label: 'Use this address', url: c.url! },
  }),
  'email-changed': (c: Content): Mail => ({
    subject: 'Your e-mail address was changed',
    lines: [
      `Hello ${c.name},`,
      `Your account now uses ${c.email}. If that was not you, choose a new password at once and write to your school or to us.`,
    ],
  }),
  'password-changed': (c: Content): Mail => ({
    subject: 'Your password was changed',
    lines: [
      `Hello ${c.name},`,
      'Your password was changed, and all other browsers were signed out. If that was not you, choose a new one at once.',
    ],
    link: { label: 'Choose a new password', url: c.url! },
  }),
} satisfies Record<string, (content: Content) => Mail>;

export type Template = keyof typeof templates;

const escape = (text: string) =>
  text.replace(
    /[&<>"']/g,
    (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[c]!,
  );

/** Line breaks would start new headers; a subject has none. */
const oneLine = (text: string) => text.replace(/[\r\n\u2028\u2029]+/g, ' ').trim();

export function render(
  template: Template,
  content: Content,
): { subject: string; text: string; html: string } {
  const clean = Object.fromEntries(Object.entries(content).map(([key, value]) => [key, oneLine(value)]));
  const { subject, lines, link }: Mail = templates[template](clean);
  const footer = 'Dropwise. You get this mail because of something done with your account.';
  return {
    subject: oneLine(subject),
    text: [...lines, ...(link ? [`${link.label}: ${link.url}`] : []), footer].join('\n\n') + '\n',
    html:
      `<!doctype html><html lang="en"><body style="font-family:sans-serif;color:#1d2733;max-width:34em">` +
      lines.map((line) => `<p>${escape(line)}</p>`).join('') +
      (link ? `<p><a href="${escape(link.url)}" style="color:#1b3f9c">${escape(link.label)}</a></p>` : '') +
      `<p style="color:#59626c">${footer}</p></body></html>`,
  };
}
