/** Sentences of a lesson with their lines, as a reader reads them: no code, no blocks, no mathematics. */
import type { Root, RootContent } from 'mdast';
import { visit } from 'unist-util-visit';
import { parseMarkdown } from '../prose.ts';

export interface Sentence {
  readonly line: number;
  readonly text: string;
}

export interface Passage {
  /** The prose before the block of this number among all fenced blocks of the lesson; the last one ends the text. */
  readonly before: number;
  readonly sentences: readonly Sentence[];
}

const BLOCKS = new Set(['bench', 'prediction', 'question']);

/** The prose between the blocks, in order. */
export function passagesOf(markdown: string): Passage[] {
  const tree: Root = parseMarkdown(markdown);
  const passages: Passage[] = [];
  let sentences: Sentence[] = [];
  for (const node of tree.children) {
    if (node.type === 'code' && BLOCKS.has(node.lang ?? '')) {
      passages.push({ before: passages.length, sentences });
      sentences = [];
    } else sentences.push(...sentencesIn(node));
  }
  return [...passages, { before: passages.length, sentences }];
}

function sentencesIn(node: RootContent): Sentence[] {
  const found: Sentence[] = [];
  visit({ type: 'root', children: [node] } as Root, (inner) => {
    if (inner.type !== 'paragraph' && inner.type !== 'heading') return;
    // Inline mathematics and computed values count as one word each.
    const text = textOf(inner as RootContent)
      .replace(/\s+/g, ' ')
      .trim();
    for (const sentence of text.split(/(?<=[.!?:])\s+(?=[\p{Lu}"“(])/u))
      if (/\p{L}/u.test(sentence)) found.push({ line: inner.position?.start.line ?? 1, text: sentence });
  });
  return found;
}

function textOf(node: RootContent): string {
  if (node.type === 'text') return node.value;
  if (node.type === 'inlineCode' || (node.type as string) === 'inlineMath') return 'X';
  return 'children' in node ? (node.children as RootContent[]).map(textOf).join('') : '';
}

export const wordsIn = (text: string): string[] => text.match(/[\p{L}\p{N}][\p{L}\p{N}'’-]*/gu) ?? [];
