// The demo's post office: takes every mail over SMTP and shows it on a page. Mails are kept as files, so that they
// outlive a restart; nothing leaves this machine.
import { mkdir, readdir, readFile, rename, writeFile } from 'node:fs/promises';
import { createServer } from 'node:http';
import { join } from 'node:path';
import PostalMime from 'postal-mime';
import { SMTPServer } from 'smtp-server';

const KEPT = 200;
const LARGEST = 2 * 1024 * 1024;

/** @param {unknown} text */
const escaped = (text) => String(text ?? '').replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);

const STYLE = `body{margin:0 auto;max-width:52rem;padding:1.5rem;font:1.0625rem/1.6 system-ui,sans-serif;color:#1b2430;background:#fff}
article{border-top:1px solid #c9d0d9;padding:1rem 0}h2{font-size:1.125rem;margin:0}pre{white-space:pre-wrap;font:inherit;overflow-wrap:anywhere}a{color:#1f4bb8}small{color:#4d5866}`;

/** Plain text with its addresses made into links. @param {string} text */
const linked = (text) =>
  escaped(text).replace(
    /https?:\/\/[^\s<>"']+/g,
    (address) => `<a href="${address}" rel="noreferrer">${address}</a>`,
  );

/** @param {import('postal-mime').Email & { id: string }} mail */
const shown = (mail) => `<article><h2>${escaped(mail.subject)}</h2>
<small>to ${escaped(mail.to?.map((to) => to.address).join(', '))} · <time>${escaped(mail.date)}</time></small>
<pre>${linked(mail.text ?? '')}</pre></article>`;

/**
 * Starts the SMTP server and the page, both on loopback.
 * @param {{ folder: string, smtpPort: number, pagePort: number }} options
 */
export async function startMailCatcher({ folder, smtpPort, pagePort }) {
  await mkdir(folder, { recursive: true });
  let count = 0;

  /** @param {string} [recipient] newest first */
  async function mails(recipient) {
    const names = (await readdir(folder)).filter((name) => name.endsWith('.eml')).sort();
    const read = names
      .slice(-KEPT)
      .reverse()
      .map(async (name) => ({
        ...(await PostalMime.parse(await readFile(join(folder, name)))),
        id: name,
      }));
    const all = await Promise.all(read);
    return recipient ? all.filter((mail) => mail.to?.some((to) => to.address === recipient)) : all;
  }

  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    size: LARGEST,
    onData(stream, _session, done) {
      /** @type {Buffer[]} */
      const chunks = [];
      stream.on('data', (chunk) => chunks.push(chunk));
      stream.on('end', async () => {
        if (stream.sizeExceeded)
          return done(Object.assign(new Error('The mail is too large'), { responseCode: 552 }));
        try {
          const name = `${new Date().toISOString().replace(/[:.]/g, '-')}-${process.pid}-${count++}.eml`;
          await writeFile(join(folder, `${name}.part`), Buffer.concat(chunks));
          await rename(join(folder, `${name}.part`), join(folder, name));
          done();
        } catch (error) {
          done(error instanceof Error ? error : new Error(String(error)));
        }
      });
    },
  });

  const page = createServer(async (request, response) => {
    const url = new URL(request.url ?? '/', 'http://127.0.0.1');
    try {
      if (request.method !== 'GET' || !['/', '/mails.json'].includes(url.pathname)) {
        response.writeHead(404).end();
        return;
      }
      const list = await mails(url.searchParams.get('to') ?? undefined);
      response.setHeader('Cache-Control', 'no-store');
      response.setHeader('X-Content-Type-Options', 'nosniff');
      response.setHeader(
        'Content-Security-Policy',
        "default-src 'none'; style-src 'unsafe-inline'; frame-ancestors 'none'",
      );
      if (url.pathname === '/mails.json') {
        response.setHeader('Content-Type', 'application/json; charset=utf-8');
        response.end(JSON.stringify(list));
        return;
      }
      response.setHeader('Content-Type', 'text/html; charset=utf-8');
      response.end(`<!doctype html><html lang="en-GB"><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<title>Mail of the demo · Dropwise</title><style>${STYLE}</style><main><h1>Mail of the demo</h1>
<p>Every mail that Dropwise sent here, newest first. None of them left this machine.</p>
${list.map(shown).join('\n') || '<p>No mail yet.</p>'}</main></html>`);
    } catch (error) {
      console.error(error);
      response.writeHead(500).end();
    }
  });

  await Promise.all([
    new Promise((resolve, reject) => {
      smtp.on('error', reject);
      smtp.listen(smtpPort, '127.0.0.1', () => resolve(undefined));
    }),
    new Promise((resolve, reject) => {
      page.once('error', reject);
      page.listen(pagePort, '127.0.0.1', () => resolve(undefined));
    }),
  ]);
  return {
    stop: async () => {
      page.closeAllConnections();
      await Promise.all([
        new Promise((resolve) => smtp.close(() => resolve(undefined))),
        new Promise((resolve) => page.close(resolve)),
      ]);
    },
  };
}
