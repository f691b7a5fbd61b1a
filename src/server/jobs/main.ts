import { sequelize } from '../database/index.ts';
import { log } from '../log.ts';
import { sendDue } from '../mail/send.ts';
import { deleteExpiredCounts } from '../rate-limit/index.ts';
import { deleteExpiredSessions } from '../sign-in/sessions.ts';
import { deleteExpiredTokens } from '../sign-in/tokens.ts';

/** The job process: mails every second, tidying every ten minutes. Any number may run; rows are locked, not jobs. */
let stopping = false;
const wake: { now?: () => void } = {};

function pause(ms: number): Promise<void> {
  return new Promise((resolve) => {
    const timer = setTimeout(resolve, ms);
    wake.now = () => {
      clearTimeout(timer);
      resolve();
    };
  });
}

for (const signal of ['SIGTERM', 'SIGINT'] as const)
  process.on(signal, () => {
    stopping = true;
    wake.now?.();
  });

let tidied = 0;
log.info('jobs running');
while (!stopping) {
  try {
    await sendDue();
    if (Date.now() - tidied > 600_000) {
      tidied = Date.now();
      await deleteExpiredSessions();
      await deleteExpiredTokens();
      await deleteExpiredCounts();
    }
  } catch (error) {
    log.error({ err: error }, 'jobs: this round failed, the next one tries again');
  }
  if (!stopping) await pause(1000);
}
await sequelize.close();
log.info('jobs stopped');
