import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createDb } from '@/db/client';
import { saveHeartbeat } from '@/db/queries/jobs';
import { getConfig } from '@/lib/config';
import { createSmtpMailer } from '@/lib/mail/smtp-mailer';
import { createS3Store } from '@/lib/storage/s3-store';
import { type HealthDeps, checkHealth } from '@/lib/workflows/check-health';
import { unusedPort } from '../support/ports';
import { type TestServices, openServices } from '../support/services';

let services: TestServices;
let whole: HealthDeps;
beforeAll(async () => {
  services = await openServices();
  whole = { ...services.deps, mailer: createSmtpMailer(getConfig().mail) };
  await saveHeartbeat(services.deps.db, 'w1', services.deps.now());
});
afterAll(() => services.close());

describe('checkHealth', () => {
  it('finds every part up', async () => {
    const health = await checkHealth(whole);
    expect(health).toEqual({ parts: { database: 'up', store: 'up', mail: 'up', worker: 'up' }, down: [] });
  });

  it('names the mail server that is away', async () => {
    const mailer = createSmtpMailer({ ...getConfig().mail, smtpUrl: `smtp://127.0.0.1:${await unusedPort()}` });
    expect((await checkHealth({ ...whole, mailer })).down).toEqual(['mail']);
  });

  it('names the store whose bucket is gone', async () => {
    const storage = createS3Store({ ...getConfig().store, bucket: 'no-such-bucket' });
    expect((await checkHealth({ ...whole, storage })).down).toEqual(['store']);
  });

  it('names the database that is away, and the worker that can only be seen in it', async () => {
    const away = createDb(`mysql://nobody:x@127.0.0.1:${await unusedPort()}/none`);
    expect((await checkHealth({ ...whole, db: away.db })).down).toEqual(['database', 'worker']);
    await away.close();
  });

  it('names the worker that was not seen for 20 seconds', async () => {
    services.clock.forward(20_001);
    expect((await checkHealth(whole)).down).toEqual(['worker']);
    await saveHeartbeat(services.deps.db, 'w2', services.deps.now());
    expect((await checkHealth(whole)).down).toEqual([]);
  });
});
