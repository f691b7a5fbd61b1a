// The process of the local fakes: started by `npm start`, refused in production.
import { startMailCatcher } from './mail.mjs';

if (process.env.DEMO !== 'true') {
  console.error('The local fakes only run in the demo (DEMO=true).');
  process.exit(1);
}
const mail = await startMailCatcher({
  folder: process.env.MAIL_FOLDER ?? '.data/mail',
  smtpPort: Number(new URL(process.env.SMTP_URL ?? '').port),
  pagePort: Number(process.env.MAIL_PAGE_PORT),
});
process.once('SIGTERM', async () => {
  await mail.stop();
  process.exit(0);
});
