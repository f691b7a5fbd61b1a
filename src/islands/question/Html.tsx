import type { ElementType } from 'react';

/** A paragraph alone loses its `<p>`, so that it may stand within a line or a label. */
const unwrapped = (html: string): string => {
  const [, inner] = /^\s*<p>((?:(?!<p[ >])[\s\S])*)<\/p>\s*$/.exec(html) ?? [];
  return inner ?? html;
};

/** Text of a lesson: sanitised when the lesson was compiled, filled with computed numbers on the server. */
export function Html({
  html,
  as: As = 'div',
  ...rest
}: {
  html: string;
  as?: ElementType;
  className?: string;
  id?: string;
}) {
  // It did go through that sanitiser: questions are compiled there, and numbers are filled in behind it.
  // eslint-disable-next-line no-restricted-syntax
  return <As {...rest} dangerouslySetInnerHTML={{ __html: As === 'div' ? html : unwrapped(html) }} />;
}
