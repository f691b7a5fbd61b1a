import { describe, expect, it } from 'vitest';
import { compile } from '../../../src/lessons/index.ts';
import { block, SOUND } from './lesson.ts';

const file = '90-two-beakers.md';
/** A generous bound: the sound lesson takes a twentieth of it on a slow laptop. */
const MOST_MS = 4000;
const MOST_MB = 300;

/** Compiles within bounds of time and memory. */
function bounded(markdown: string) {
  const before = process.memoryUsage().heapUsed;
  // Time of this process's own work: a busy machine makes no lesson hostile.
  const start = process.cpuUsage();
  const result = compile(markdown, { file });
  const { user, system } = process.cpuUsage(start);
  expect((user + system) / 1000).toBeLessThan(MOST_MS);
  expect((process.memoryUsage().heapUsed - before) / 1e6).toBeLessThan(MOST_MB);
  return result;
}

const bomb = `a: &a [x,x,x,x,x,x,x,x,x]\n${'bcdefghi'
  .split('')
  .map((name, n) => `${name}: &${name} [${Array(9).fill(`*${'abcdefgh'[n]}`).join(',')}]`)
  .join('\n')}`;

describe('hostile text is refused', () => {
  it.each([
    ['a YAML bomb', block('bench', bomb)],
    ['YAML nested a thousand deep', block('bench', `id: ${'['.repeat(1000)}${']'.repeat(1000)}`)],
    [
      'YAML maps nested by indentation',
      block('bench', Array.from({ length: 200 }, (_, n) => `${' '.repeat(n)}a:`).join('\n')),
    ],
    ['a YAML merge key', block('bench', 'id: x\n<<: { title: y }')],
    ['a YAML tag', block('bench', 'id: !!js/function "function(){}"')],
    ['a block of a megabyte', block('bench', `id: ${'x'.repeat(1_000_000)}`)],
    ['a lesson of a megabyte', SOUND + 'word '.repeat(200_000)],
    ['a prototype name', block('bench', '__proto__: { polluted: true }\nid: x')],
    ['quotes nested a thousand deep', `${SOUND}\n${'>'.repeat(1000)} deep`],
    ['lists nested a thousand deep', `${SOUND}\n${'- '.repeat(1000)}deep`],
    ['brackets without end', `${SOUND}\n${'['.repeat(10_000)}`],
    ['image brackets without end', `${SOUND}\n${'!['.repeat(10_000)}`],
    ['emphasis without end', `${SOUND}\n${'*'.repeat(10_000)}`],
    ['a script', `${SOUND}\n<script>alert(1)</script>\n`],
    ['an event handler', `${SOUND}\n<img src=x onerror=alert(1)>\n`],
    ['a comment', `${SOUND}\n<!-- quiet -->\n`],
    ['a picture as data', `${SOUND}\n![x](data:image/svg+xml;base64,PHN2Zz4=)\n`],
    ['a picture from elsewhere without a scheme', `${SOUND}\n![x](//pictures.example/x.png)\n`],
    ['a link in capitals that runs a script', `${SOUND}\n[x](JaVaScRiPt:alert(1))\n`],
  ])('%s', (_, markdown) => {
    expect(bounded(markdown).ok).toBe(false);
    expect(({} as { polluted?: boolean }).polluted).toBeUndefined();
  });

  it('KaTeX that grows without end, links or loads is shown as its source', () => {
    for (const source of [
      '\\def\\a{\\a\\a}\\a',
      '\\href{javascript:alert(1)}{x}',
      '\\includegraphics{https://pictures.example/x.png}',
      '\\htmlData{x=y}{z}',
      '\\rule{1000em}{1000em}',
    ]) {
      const result = bounded(`${SOUND}\n$${source}$\n`);
      const html = JSON.stringify(result);
      expect(html).not.toContain('href=\\"javascript');
      expect(html).not.toMatch(/<img|data-x/);
      expect(html).not.toMatch(/(width|height)(:|=\\")1000em/);
    }
  });

  it('formulas and alternating signs by the thousand end soon', () => {
    for (const text of [
      '*_'.repeat(5000),
      '`a '.repeat(5000),
      '$a'.repeat(3000),
      '[a](b '.repeat(3000),
      '&amp;'.repeat(9000),
      ':a['.repeat(3000),
    ])
      bounded(`${SOUND}\n${text}\n`);
  });
});

describe('whatever is typed, compile answers', () => {
  it('never throws on a lesson with a piece cut out', () => {
    for (let at = 0; at < SOUND.length; at += 37)
      for (const length of [1, 9, 150]) {
        const cut = SOUND.slice(0, at) + SOUND.slice(at + length);
        expect(() => compile(cut, { file })).not.toThrow();
      }
  }, 60_000);
});
