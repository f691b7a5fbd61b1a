import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { compile } from '../../../src/lessons/index.ts';
import { wrongMethods } from '../../../src/lessons/questions/wrongMethods.ts';

/** What the guide shows has to work as it stands: teachers copy it. */
const guide = readFileSync(new URL('../../../content/README.md', import.meta.url), 'utf8');
const blocks = [...guide.matchAll(/^````markdown\n([\s\S]*?)^````$/gm)].map((match) => match[1]!);
const head =
  '---\ntitle: Guide\nnumber: 1\nsummary: Shown in the guide.\nmodel: textbook\nminutes: 5\n---\n\n';

const buffer = `  - id: buffer
    label: Ethanoate buffer
    glass: beaker-100
    probe: true
    stirrer: "on"
    contents:
      volume_mL: 50
      parts:
        - { substance: CH3COOH, concentration_molL: 0.005 }
        - { substance: CH3COONa, concentration_molL: 0.005 }
      indicators: [{ indicator: bromocresol-green, volume_mL: 0.5 }]
shelf:`;
const [bench, prediction, question] = [0, 1, 2].map((n) => blocks[n]!);
const lesson = [head, prediction, bench!.replace('shelf:', () => buffer), question].join('\n');

const compiled = (markdown: string) => {
  const result = compile(markdown, { file: '01-guide.md' });
  if (!result.ok) throw new Error(result.faults.map(({ line, message }) => `${line} ${message}`).join('\n'));
  return result.lesson;
};

describe('the guide for authors', () => {
  it('shows a prediction, a bench and a question that compile', () => {
    expect(blocks).toHaveLength(3);
    expect(compiled(lesson).checkpoints.map(({ id }) => id)).toEqual([
      'which-turns-first',
      'water-yellow',
      'pickles',
    ]);
  });

  const shown = [...guide.matchAll(/^\| `` (`= .+?`) ``\s+\| (.+?)\s*\|$/gm)].map(
    (match) => [match[1]!, match[2]!] as const,
  );
  it('shows computed numbers', () => expect(shown.length).toBeGreaterThan(4));
  it.each(shown)('%s is %s', (source, seen) => {
    const last = compiled(`${lesson}\n${source}\n`).blocks.at(-1)!;
    const text = last.kind === 'prose' ? last.html.replace(/<[^>]+>/g, '').replace(/\u00a0/g, ' ') : '';
    if (/^[\d.]/.test(seen)) expect(text).toBe(seen);
    else expect(text).toMatch(/^\d/);
  });

  it('names every wrong method', () => {
    for (const method of Object.keys(wrongMethods)) expect(guide).toContain(`\`${method}\``);
  });
});
