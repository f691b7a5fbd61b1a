// What a deployment runs before the web processes start: the schema brought up to date and the shipped course published.
// Each step may be repeated at any time.
import path from 'node:path';
import { migrate, sequelize } from './database/index.ts';
import { publishShippedCourse } from './lessons/index.ts';

try {
  await migrate();
  await publishShippedCourse(path.resolve('content/lessons'));
} finally {
  await sequelize.close();
}
