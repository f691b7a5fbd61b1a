import type { Role } from '../database/index.ts';

/**
 * Who may reach which route, by the pattern under which Astro routes it. A route that is not listed here is closed to
 * everyone; a test walks src/pages and fails for one without a rule. Rows (whose run, which school) are checked where
 * they are read.
 */
export type Rule = 'public' | 'signed-out' | 'signed-in' | { readonly role: readonly Role[] };

export const rules: Readonly<Record<string, Rule>> = {
  '/': 'public',
  '/404': 'public',
  '/500': 'public',
  '/_actions/[...path]': 'public',
  '/account': 'signed-in',
  '/api/answers': 'public',
  '/api/lessons/[slug]/progress': 'signed-in',
  '/api/observations': 'signed-in',
  '/api/outcomes': 'public',
  '/api/predictions': 'signed-in',
  '/api/runs': 'signed-in',
  '/api/runs/[id]/moves': 'signed-in',
  '/api/runs/[id]/notebook.csv': 'signed-in',
  '/api/takeover': 'signed-in',
  '/account/export': 'signed-in',
  '/accessibility': 'public',
  '/closed/[slug]': 'public',
  '/desk': { role: ['author'] },
  '/forgot': 'public',
  '/how-the-numbers-are-made': 'public',
  '/lessons': 'public',
  '/lessons/[slug]': 'public',
  '/notebook': 'signed-in',
  '/notebook/[id]': 'signed-in',
  '/privacy': 'public',
  '/reset': 'public',
  '/sign-in': 'public',
  '/sign-out': 'public',
  '/sign-up': 'public',
  '/verify': 'public',
  '/verify-change': 'public',
};

export function ruleFor(routePattern: string): Rule | undefined {
  return Object.hasOwn(rules, routePattern) ? rules[routePattern] : undefined;
}
