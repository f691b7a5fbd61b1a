// Unexpected console output fails the test that made it. A test that expects some replaces the method itself
// (vi.spyOn(console, 'error').mockImplementation(...)).
import { afterEach, beforeEach } from 'vitest';

const METHODS = ['debug', 'error', 'info', 'log', 'trace', 'warn'] as const;
const original = Object.fromEntries(METHODS.map((method) => [method, console[method]]));
let unexpected: string[] = [];

beforeEach(() => {
  unexpected = [];
  for (const method of METHODS)
    console[method] = (...said: unknown[]) =>
      void unexpected.push(`console.${method}: ${said.map(String).join(' ')}`);
});

afterEach(() => {
  Object.assign(console, original);
  if (unexpected.length > 0) throw new Error(`unexpected console output:\n${unexpected.join('\n')}`);
});
