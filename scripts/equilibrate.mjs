// `npm run -s equilibrate < problems.jsonl`: solves one JSON problem a line and prints one JSON answer a line, in order.
// A line that cannot be answered gets {"id","error"}; nothing on the input ends the program.
import { createInterface } from 'node:readline';
import { register } from 'tsx/esm/api';

register();
const { answerLine } = await import('./equilibrate/answer.ts');

// A reader that closes early (`| head`) is no failure.
process.stdout.on('error', (error) => {
  if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EPIPE') process.exit();
  throw error;
});

for await (const line of createInterface({ input: process.stdin, crlfDelay: Infinity })) {
  if (line.trim() === '') continue;
  if (!process.stdout.write(`${answerLine(line)}\n`))
    await new Promise((resolve) => process.stdout.once('drain', () => resolve(undefined)));
}
