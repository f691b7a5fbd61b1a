/**
 * How many bytes of JavaScript and CSS each kind of page makes a browser fetch, as they come over the wire (Brotli):
 * what the page's own HTML names, and what that imports at once. The built product is asked, so it has to be running:
 * `SITE` names it, http://127.0.0.1:4321 where it is not set.
 */
const SITE = process.env.SITE ?? 'http://127.0.0.1:4321';

/** One address of each kind of page that a visitor can open. */
const KINDS = { home: '/', rack: '/lessons', 'sign-in': '/sign-in' };

async function fetched(path: string): Promise<{ text: string; bytes: number }> {
  const answer = await fetch(new URL(path, SITE), { headers: { 'accept-encoding': 'br' } });
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
      for (const next of importsOf(text)) waiting.push(new URL(next, new URL(file, SITE)).pathname);
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
