/**
 * The mail server's fake: takes every mail and delivers none. Each becomes one JSON file; a small HTTP listing serves
 * them to the /mail-sink page and to the tests. Usage: mail-sink.mjs SMTP_PORT HTTP_PORT FOLDER
 *
 *   GET /mails       newest first, at most 200      GET /mails?to=ADDRESS  those to one address
 *   GET /mails/ID    one mail                       DELETE /mails          empties the sink
 */
import { randomBytes } from 'node:crypto';
import { mkdirSync } from 'node:fs';
import { readdir, readFile, rename, rm, writeFile } from 'node:fs/promises';
import http from 'node:http';
import path from 'node:path';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

const [smtpPort, httpPort, folder] = process.argv.slice(2);
const LISTED = 200;
mkdirSync(folder, { recursive: true });

/** Ids sort by arrival: milliseconds since 1970 in base 36, then chance. */
function newId() {
  return `${Date.now().toString(36).padStart(9, '0')}-${randomBytes(4).toString('hex')}`;
}

async function keep(stream, session) {
  const mail = await simpleParser(stream);
  const id = newId();
  const kept = {
    id,
    receivedAt: new Date().toISOString(),
    from: mail.from?.text ?? '',
    to: session.envelope.rcptTo.map(({ address }) => address),
    subject: mail.subject ?? '',
    text: mail.text ?? '',
    html: mail.html || null,
    messageId: mail.messageId ?? null,
  };
  const draft = path.join(folder, `${id}.part`);
  await writeFile(draft, JSON.stringify(kept, null, 2));
  await rename(draft, path.join(folder, `${id}.json`));
}

async function mailIds() {
  const names = await readdir(folder);
  return names.filter((name) => name.endsWith('.json')).sort().reverse().map((name) => name.slice(0, -5));
}

async function readMail(id) {
  return JSON.parse(await readFile(path.join(folder, `${id}.json`), 'utf8'));
}

async function listMails(to) {
  const mails = [];
  for (const id of await mailIds()) {
    const mail = await readMail(id);
    if (!to || mail.to.some((address) => address.toLowerCase() === to.toLowerCase())) mails.push(mail);
    if (mails.length === LISTED) break;
  }
  return mails;
}

async function empty() {
  for (const id of await mailIds()) await rm(path.join(folder, `${id}.json`), { force: true });
  return [];
}

async function answer(request) {
  const url = new URL(request.url ?? '/', 'http://127.0.0.1');
  if (url.pathname === '/mails' && request.method === 'DELETE') return empty();
  if (url.pathname === '/mails') return listMails(url.searchParams.get('to'));
  const id = /^\/mails\/([a-z0-9]+-[0-9a-f]{8})$/.exec(url.pathname)?.[1];
  return id && (await mailIds()).includes(id) ? readMail(id) : undefined;
}

const listing = http.createServer((request, response) => {
  answer(request).then(
    (body) => response.writeHead(body ? 200 : 404, { 'content-type': 'application/json' }).end(JSON.stringify(body ?? null)),
    (error) => response.writeHead(500).end(String(error)),
  );
});

const smtp = new SMTPServer({
  authOptional: true,
  disabledCommands: ['STARTTLS'],
  logger: false,
  onData: (stream, session, done) => keep(stream, session).then(() => done(), done),
});
smtp.on('error', (error) => process.stderr.write(`${error}\n`));

smtp.listen(Number(smtpPort), '127.0.0.1');
listing.listen(Number(httpPort), '127.0.0.1');
for (const signal of ['SIGTERM', 'SIGINT']) process.on(signal, () => process.exit(0));
