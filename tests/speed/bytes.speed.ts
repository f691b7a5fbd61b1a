/**
 * How many bytes of JavaScript and CSS each kind of page makes a browser fetch, as they come over the wire (Brotli):
 * what the page's own HTML names, and what that imports at once.
 */
import { cookiesOf, site, stopSite } from './site.ts';

/** One address of each kind of page, as somebody signed in opens it where that makes a difference. */
const KINDS = {
  home: '/',
  text: '/how-the-numbers-are-made',
  form: '/sign-up',
  rack: '/lessons',
  lesson: '/lessons/meeting-a-buffer',
  notebook: '/notebook',
  account: '/account',
};

let cookie: string | undefined;

async function fetched(path: string): Promise<{ text: string; bytes: number }> {
  const one = await site();
  cookie ??= await cookiesOf(one, 'ikaika');
  const answer = await fetch(new URL(path, one.address), { headers: { cookie, 'accept-encoding': 'br' } });
  if (!answer.ok) throw new Error(`${path} answered ${answer.status}`);
  return { text: await answer.text(), bytes: Number(answer.headers.get('content-length') ?? 0) };
}

/** Static imports of a built module; what stands in `import()` is fetched later, or never. */
const importsOf = (code: string): string[] =>
  [
    ...code.matchAll(/(?:^|[;}\s])(?:import|export)\s*(?:[\w*{}\s,$]+from\s*)?["'](\.{1,2}\/[^"']+)["']/g),
  ].map(([, file]) => file!);

/** Everything that a page fetches until its islands stand. */
async function bytesOf(path: string, ending: '.js' | '.css'): Promise<number> {
  const { text: html } = await fetched(path);
  const waiting = [...html.matchAll(/\/_astro\/[^"' )]+/g)]
    .map(([file]) => file)
    .filter((file) => file.endsWith(ending));
  const seen = new Map<string, number>();
  for (let file = waiting.pop(); file; file = waiting.pop()) {
    if (seen.has(file)) continue;
    const { text, bytes } = await fetched(file);
    seen.set(file, bytes || Buffer.byteLength(text));
    if (ending === '.js')
      for (const next of importsOf(text))
        waiting.push(new URL(next, new URL(file, 'http://site.invalid')).pathname);
  }
  return [...seen.values()].reduce((sum, bytes) => sum + bytes, 0);
}

export const benchmarks = Object.entries(KINDS).flatMap(([kind, path]) =>
  (['.js', '.css'] as const).map((ending) => ({
    name: `bytes ${kind} ${ending.slice(1)}`,
    unit: 'B',
    run: async () => ({ median: await bytesOf(path, ending), samples: 1 }),
  })),
);

export const finish = stopSite;
