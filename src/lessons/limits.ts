/** What is refused before a lesson is parsed: text whose cost grows with its nesting or its length. */

const LONGEST = 200_000;
/** Nested lists and quotes beyond this are a mistake or an attack; the parser's work grows with them. */
const DEEPEST = 40;

/** Why this text is not parsed at all; null where it is. */
export function tooMuch(markdown: string): string | null {
  if (markdown.length > LONGEST)
    return `This lesson has ${markdown.length} characters; ${LONGEST} are the most.`;
  for (const line of markdown.split('\n')) {
    const marks = /^[\s>*+\-\d.)]*/.exec(line)![0];
    if (marks.replace(/[\s\d.)]/g, '').length > DEEPEST || /^ {200}/.test(line))
      return `Lists and quotes are nested more than ${DEEPEST} deep.`;
    if (/[[(*_`$]{200}/.test(line) || /(!?\[){100}/.test(line))
      return 'A line repeats the same signs too often.';
  }
  return null;
}
