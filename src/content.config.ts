import { readdir, readFile } from 'node:fs/promises';
import { fileURLToPath } from 'node:url';
import { defineCollection, z } from 'astro:content';
import { compile, slugOf, tellFault } from './lessons';

/**
 * The shipped course. Building the product validates it: a lesson with faults stops the build and names them. Pages read
 * lessons from the database, where a deployment publishes this folder.
 */
const lessons = defineCollection({
  loader: {
    name: 'course',
    async load({ config, store, generateDigest, watcher }) {
      const folder = new URL('content/lessons/', config.root);
      watcher?.add(fileURLToPath(folder));
      const files = (await readdir(folder)).filter((name) => name.endsWith('.md')).sort();
      const faults: string[] = [];
      const kept = new Set<string>();
      for (const file of files) {
        const markdown = await readFile(new URL(file, folder), 'utf8');
        const digest = generateDigest(markdown);
        const result = compile(markdown, { file });
        if (!result.ok) {
          faults.push(...result.faults.map((fault) => `content/lessons/${tellFault(fault)}`));
          continue;
        }
        const { title, number, summary, access, draft, minutes } = result.lesson;
        const id = slugOf(file);
        kept.add(id);
        store.set({ id, digest, data: { title, number, summary, access, draft, minutes } });
      }
      if (faults.length > 0) throw new Error(`The course has faults:\n${faults.join('\n')}`);
      for (const id of store.keys()) if (!kept.has(id)) store.delete(id);
    },
    schema: z.object({
      title: z.string(),
      number: z.number(),
      summary: z.string(),
      access: z.enum(['open', 'members']),
      draft: z.boolean(),
      minutes: z.number(),
    }),
  },
});

export const collections = { lessons };
