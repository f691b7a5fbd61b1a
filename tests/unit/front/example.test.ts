import { readFileSync } from 'node:fs';
import { parseEnv } from 'node:util';
import { describe, expect, it } from 'vitest';
import { readSettings } from '../../../scripts/front/settings.ts';

const example = readFileSync('.env.example', 'utf8');

describe('.env.example', () => {
  it('works as it stands', () => {
    expect(() => readSettings(parseEnv(example) as NodeJS.ProcessEnv)).not.toThrow();
  });

  it('names every setting that the code reads', () => {
    const read = ['scripts/front/settings.ts', 'src/server/config/index.ts'].map((file) =>
      readFileSync(file, 'utf8'),
    );
    const names = new Set(read.join('\n').match(/\b[A-Z][A-Z0-9]+(?:_[A-Z0-9]+)*(?=: (?:z\.|port|flag))/g));
    expect(names.size).toBeGreaterThan(10);
    for (const name of names) expect(example, name).toMatch(new RegExp(`^${name}=`, 'm'));
  });
});
