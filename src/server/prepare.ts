// What a deployment runs before the web processes start: the schema brought up to date and the shipped course published; for the
// demo also its world, whose sign-ins it prints. Each step may be repeated at any time.
import path from 'node:path';
import { config } from './config/index.ts';
import { migrate, sequelize } from './database/index.ts';
import { loadDemoWorld } from './demo/load.ts';
import { publishShippedCourse } from './lessons/index.ts';

try {
  await migrate();
  await publishShippedCourse(path.resolve('content/lessons'));
  if (config.DEMO === 'true') process.stdout.write(`${await loadDemoWorld()}\n`);
} finally {
  await sequelize.close();
}
