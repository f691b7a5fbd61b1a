import { createHmac } from 'node:crypto';

/** Short, easily told apart, and easily typed on a tablet. */
const WORDS = [
  ...['amber', 'anchor', 'apron', 'barley', 'basin', 'beacon', 'bramble', 'brine', 'buoy', 'cedar', 'chalk'],
  ...['clover', 'cobble', 'copper', 'coral', 'cove', 'crane', 'curlew', 'dune', 'eddy', 'ember', 'fennel'],
  ...['fern', 'flint', 'gorse', 'gravel', 'gull', 'harbour', 'heath', 'heron', 'inlet', 'kelp', 'lagoon'],
  ...[
    'lantern',
    'larch',
    'lichen',
    'limpet',
    'maple',
    'marsh',
    'mussel',
    'oyster',
    'pebble',
    'pine',
    'plover',
  ],
  ...['quarry', 'reed', 'ripple', 'rush', 'saddle', 'samphire', 'sedge', 'shingle', 'sluice', 'spruce'],
  ...['spring', 'teal', 'tern', 'thistle', 'tide', 'timber', 'whelk', 'willow', 'wharf', 'yarrow'],
] as const;

/**
 * A password of the demo: follows from the secret that was made up at the first start, so that it stays and stands nowhere.
 * Five of 64 words are as good as thirty tosses of a coin; sign-in is slowed long before that.
 */
export function demoPassword(secret: string, whose: string): string {
  const digest = createHmac('sha256', secret).update(`demo sign-in of ${whose}`).digest();
  return Array.from({ length: 5 }, (_, i) => WORDS[digest[i]! % WORDS.length]).join('-');
}
