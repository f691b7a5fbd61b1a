import 'katex/contrib/mhchem';
import type { Root as HtmlRoot } from 'hast';
import type { Root, RootContent } from 'mdast';
import rehypeKatex from 'rehype-katex';
import rehypeSanitize, { defaultSchema } from 'rehype-sanitize';
import rehypeStringify from 'rehype-stringify';
import remarkDirective from 'remark-directive';
import remarkFrontmatter from 'remark-frontmatter';
import remarkGfm from 'remark-gfm';
import remarkMath from 'remark-math';
import remarkParse from 'remark-parse';
import remarkRehype from 'remark-rehype';
import { unified } from 'unified';
import { visit } from 'unist-util-visit';
import { nearest } from './nearest.ts';
import { FormulaError, type Mixture } from './mixture.ts';
import { formatQuantity } from './format.ts';
import type { RunScope } from './formula.ts';
import { parseQuantity, valueOfQuantity, varies } from './quantity.ts';
import type { Fault } from './types.ts';

/** Boxes that prose may have: `:::caution` and `:::aside`. */
const CONTAINERS: Readonly<Record<string, { tag: string; label: string }>> = {
  caution: { tag: 'aside', label: 'Caution' },
  aside: { tag: 'aside', label: 'Note' },
};

const parser = unified()
  .use(remarkParse)
  .use(remarkFrontmatter, ['yaml'])
  .use(remarkGfm, { singleTilde: false })
  .use(remarkMath)
  .use(remarkDirective);

/** What authors' text may become. Everything else is dropped, and raw HTML is refused before it gets here. */
const schema = {
  ...defaultSchema,
  clobberPrefix: '',
  tagNames: [
    'h2',
    'h3',
    'h4',
    'p',
    'em',
    'strong',
    'del',
    'a',
    'ul',
    'ol',
    'li',
    'blockquote',
    'code',
    'pre',
    'hr',
    'br',
    'table',
    'thead',
    'tbody',
    'tr',
    'th',
    'td',
    'aside',
    'div',
    'span',
    'sub',
    'sup',
    'img',
    'data',
  ],
  attributes: {
    data: ['value', 'dataUnit', 'dataDigits', 'dataBy', 'dataFormula'],
    a: ['href'],
    img: ['src', 'alt'],
    aside: [['className', 'caution', 'aside']],
    div: [['className', 'math', 'math-display', 'box-label']],
    span: [['className', 'math', 'math-inline']],
    code: [['className', 'language-math', 'math-inline', 'math-display']],
    th: ['align'],
    td: ['align'],
    h2: ['id'],
    h3: ['id'],
  },
  protocols: { href: ['https', 'mailto'], src: [] },
  strip: ['script', 'style'],
};

const toHtml = unified()
  .use(remarkRehype)
  .use(rehypeSanitize, schema as unknown as typeof defaultSchema)
  .use(rehypeKatex, { trust: false, maxSize: 20, maxExpand: 100, strict: 'ignore', output: 'htmlAndMathml' })
  .use(rehypeStringify);

export const parseMarkdown = (markdown: string): Root => parser.parse(markdown) as Root;

/** Renders a run of prose between blocks. */
export function renderProse(nodes: readonly RootContent[]): string {
  const tree = toHtml.runSync({ type: 'root', children: [...nodes] } as Root) as HtmlRoot;
  return toHtml.stringify(tree);
}

/**
 * Checks the prose and prepares its directives, in place. Colons in running text ("acid:base at 10:30") look like text
 * directives and are put back as they were written.
 */
export function prepareProse(tree: Root, source: string, file: string): Fault[] {
  const faults: Fault[] = [];
  const fault = (
    node: { position?: { start: { line: number; column: number } } | undefined },
    message: string,
    fix?: string,
    found?: string,
  ) =>
    faults.push({
      file,
      line: node.position?.start.line ?? 1,
      column: node.position?.start.column ?? 1,
      message,
      ...(found ? { found: found.slice(0, 60) } : {}),
      ...(fix ? { fix } : {}),
    });
  visit(tree, (node, index, parent) => {
    // One fault a line: a pair of tags is one mistake.
    if (node.type === 'html' && !faults.some(({ line }) => line === node.position?.start.line))
      fault(node, 'Raw HTML is not used in a lesson. Write it in Markdown.', undefined, node.value);
    if (node.type === 'heading' && node.depth === 1)
      fault(node, "The title stands in the front matter. Start the text's headings with two signs.", '## …');
    if (node.type === 'image') {
      if (/^([a-z]+:|\/\/)/i.test(node.url))
        fault(
          node,
          'A picture has to stand beside the lesson; foreign addresses are not loaded.',
          `![${node.alt || 'What it shows'}](picture.png)`,
          node.url,
        );
      if (!node.alt) fault(node, 'Say in words what the picture shows.', `![What it shows](${node.url})`);
    }
    if (node.type === 'link' && /^(?!https:\/\/|mailto:|\/|#)/i.test(node.url))
      fault(node, 'A link starts with https:// or with a / for a page of ours.', undefined, node.url);
    if ((node.type === 'textDirective' || node.type === 'leafDirective') && parent && index !== undefined) {
      const { start, end } = node.position!;
      const text = source.slice(start.offset, end.offset);
      const plain = { type: 'text' as const, value: text };
      parent.children[index] = (
        node.type === 'leafDirective' ? { type: 'paragraph', children: [plain] } : plain
      ) as never;
      return index + 1;
    }
    if (node.type === 'containerDirective') {
      const known = CONTAINERS[node.name];
      if (!known) {
        const close = nearest(node.name, Object.keys(CONTAINERS));
        fault(
          node,
          `There is no box ':::${node.name}'. There are: ${Object.keys(CONTAINERS)
            .map((name) => `:::${name}`)
            .join(', ')}.`,
          close ? `:::${close}` : undefined,
          `:::${node.name}`,
        );
        return undefined;
      }
      node.data = { hName: known.tag, hProperties: { className: [node.name] } };
      node.children.unshift({
        type: 'paragraph',
        data: { hName: 'div', hProperties: { className: ['box-label'] } },
        children: [{ type: 'text', value: known.label }],
      } as never);
    }
    return undefined;
  });
  return faults;
}

/**
 * Turns inline code that starts with '=' into computed quantities, in place. What differs from learner to learner stays a
 * formula, to be filled for each of them; the rest is computed now.
 * @param fault told where a quantity is not understood or cannot be computed
 */
export function computeQuantities(
  nodes: readonly RootContent[],
  scope: RunScope,
  fault: (place: { line: number; column: number }, error: FormulaError) => void,
  mixture?: Mixture,
): void {
  visit({ type: 'root', children: [...nodes] } as Root, 'inlineCode', (node) => {
    if (!/^=\s/.test(node.value)) return;
    const place = node.position?.start ?? { line: 1, column: 1 };
    try {
      const source = node.value.slice(1).trim();
      const quantity = parseQuantity(source, mixture);
      const value = valueOfQuantity(quantity, scope);
      const { unit, digits, by } = quantity.style;
      const shown = formatQuantity(value, quantity.style);
      Object.assign(node, {
        type: 'quantity',
        data: {
          hName: 'data',
          hProperties: varies(quantity)
            ? { dataFormula: source }
            : { value: String(value), dataUnit: unit, dataDigits: String(digits), dataBy: by },
          hChildren: [{ type: 'text', value: varies(quantity) ? '' : shown }],
        },
      });
    } catch (error) {
      fault(place, asFormulaError(error));
    }
  });
}

/** Chemistry's and the bench's own refusals are told like ours. */
export const asFormulaError = (error: unknown): FormulaError =>
  error instanceof FormulaError ? error : new FormulaError((error as Error).message);
