// What a deployment runs before the web processes start: the schema brought up to date, the shipped course published
// and, in the demo, the demo world loaded. Each step may be repeated at any time.
import { migrate, sequelize } from './database/index.ts';

try {
  await migrate();
} finally {
  await sequelize.close();
}
