import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { queueMail } from '@/db/queries/outbox';
import { outbox } from '@/db/schema';
import { getConfig } from '@/lib/config';
import { sendDueMails } from '@/lib/jobs/send-mails';
import type { Mailer } from '@/lib/mail/mailer';
import { createSmtpMailer } from '@/lib/mail/smtp-mailer';
import { mailsTo } from '../../support/mail-sink';
import { unusedPort } from '../../support/ports';
import { type TestServices, openServices } from '../../support/services';

let services: TestServices;
let mailer: Mailer;
beforeAll(async () => {
  services = await openServices();
  mailer = createSmtpMailer(getConfig().mail);
});
afterAll(async () => {
  mailer.close();
  await services.close();
});
beforeEach(async () => void (await services.deps.db.delete(outbox)));

async function queue(to: string): Promise<string> {
  const id = services.deps.newId();
  const mail = { to, subject: 'Märkte & ii°6', text: 'Zwei Zeilen\nmit ♭VI', html: '<p>Zwei Zeilen<br>mit ♭VI</p>' };
  await queueMail(services.deps.db, id, mail, services.deps.now());
  return id;
}

async function findMail() {
  const [row] = await services.deps.db.select().from(outbox);
  return row;
}

describe('sendDueMails', () => {
  it('delivers a mail as it was written, under its own id', async () => {
    const id = await queue('ines@students.example.org');
    await sendDueMails({ ...services.deps, mailer }, 'w1');
    const [mail] = await mailsTo('ines@students.example.org');
    expect(mail).toMatchObject({ subject: 'Märkte & ii°6', from: '"Understave" <understave@example.org>' });
    expect(mail?.text.trim()).toBe('Zwei Zeilen\nmit ♭VI');
    expect(mail?.html).toContain('♭VI');
    expect(mail?.messageId).toBe(`<${id}@example.org>`);
  });

  it('keeps no text of a mail that is sent', async () => {
    await queue('kept@students.example.org');
    await sendDueMails({ ...services.deps, mailer }, 'w1');
    expect(await findMail()).toMatchObject({ state: 'sent', textBody: '', htmlBody: null, sentAt: services.deps.now() });
  });

  it('sends each mail once when several workers ask at once', async () => {
    for (let n = 0; n < 15; n += 1) await queue('once@students.example.org');
    await Promise.all(['a', 'b', 'c'].map((id) => sendDueMails({ ...services.deps, mailer }, id)));
    expect(await mailsTo('once@students.example.org')).toHaveLength(15);
  });

  it('keeps a mail while the server is away, and sends it later', async () => {
    const away = createSmtpMailer({ ...getConfig().mail, smtpUrl: `smtp://127.0.0.1:${await unusedPort()}` });
    await queue('later@students.example.org');
    await sendDueMails({ ...services.deps, mailer: away }, 'w1');
    away.close();
    expect(await findMail()).toMatchObject({ state: 'queued', attempts: 1, leasedBy: null });
    expect(await mailsTo('later@students.example.org')).toEqual([]);
    services.clock.forward(5_000);
    await sendDueMails({ ...services.deps, mailer }, 'w1');
    expect(await mailsTo('later@students.example.org')).toHaveLength(1);
  });
});
