import { setTimeout as sleep } from 'node:timers/promises';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { hasHeartbeatSince } from '@/db/queries/jobs';
import { jobs } from '@/db/schema';
import { getConfig } from '@/lib/config';
import { enqueue } from '@/lib/jobs/queue';
import { type JobHandlers, type WorkerContext, runNextJob } from '@/lib/jobs/run-job';
import { runWorker } from '@/lib/jobs/worker';
import { createSmtpMailer } from '@/lib/mail/smtp-mailer';
import { type TestServices, openServices } from '../../support/services';

let services: TestServices;
beforeAll(async () => void (services = await openServices()));
afterAll(() => services.close());
beforeEach(async () => void (await services.deps.db.delete(jobs)));

/** Handlers that note what they were asked, and fail when told. */
function notingHandlers(fails: (scoreId: string) => boolean = () => false) {
  const ran: string[] = [];
  const givenUp: string[] = [];
  const handlers: JobHandlers = {
    read_score: {
      run: async (_deps, { scoreId }) => {
        ran.push(scoreId);
        if (fails(scoreId)) throw new Error('no luck\nparams: a person’s words');
      },
      giveUp: async (_deps, { scoreId }) => void givenUp.push(scoreId),
    },
    print_handout: { run: async () => {}, giveUp: async () => {} },
    propose_reading: { run: async () => {}, giveUp: async () => {} },
  };
  return { ran, givenUp, handlers };
}

function workerOf(handlers: JobHandlers): WorkerContext {
  return { id: 'w1', deps: services.deps, handlers, running: new Set() };
}

async function queue(): Promise<string> {
  const { db, newId, now } = services.deps;
  const scoreId = newId();
  await enqueue(db, 'read_score', { scoreId }, { id: newId(), now: now() });
  return scoreId;
}

async function findJob() {
  const [row] = await services.deps.db.select().from(jobs);
  return row;
}

describe('runNextJob', () => {
  it('does a job once and marks it done', async () => {
    const scoreId = await queue();
    const { ran, handlers } = notingHandlers();
    expect(await runNextJob(workerOf(handlers))).toBe(true);
    expect(await runNextJob(workerOf(handlers))).toBe(false);
    expect(ran).toEqual([scoreId]);
    expect(await findJob()).toMatchObject({ state: 'done', leasedBy: null, dedupeKey: null });
  });

  it('tries a failing job later, each time later still, and gives it up in the end', async () => {
    const scoreId = await queue();
    const { ran, givenUp, handlers } = notingHandlers(() => true);
    const waits: number[] = [];
    for (let attempt = 1; attempt <= 6; attempt += 1) {
      expect(await runNextJob(workerOf(handlers))).toBe(true);
      const job = await findJob();
      waits.push((job?.runAfter.getTime() ?? 0) - services.deps.now().getTime());
      services.clock.forward(3_600_000);
    }
    expect(ran).toHaveLength(6);
    expect(waits.slice(0, 5)).toEqual([5_000, 10_000, 20_000, 40_000, 80_000]);
    expect(givenUp).toEqual([scoreId]);
    expect(await findJob()).toMatchObject({ state: 'dead', attempts: 6, dedupeKey: null });
  });

  it('keeps the first line of a failure and no more of it', async () => {
    await queue();
    await runNextJob(workerOf(notingHandlers(() => true).handlers));
    expect((await findJob())?.lastError).toBe('Error: no luck');
  });

  it('gives up a job whose worker died during its last try, without running it again', async () => {
    const scoreId = await queue();
    const past = new Date(services.deps.now().getTime() - 1_000);
    await services.deps.db.update(jobs).set({ state: 'running', attempts: 6, leasedBy: 'dead', leasedUntil: past });
    const { ran, givenUp, handlers } = notingHandlers();
    await runNextJob(workerOf(handlers));
    expect(ran).toEqual([]);
    expect(givenUp).toEqual([scoreId]);
    expect((await findJob())?.state).toBe('dead');
  });

  it('leaves a kind it does not know to a newer worker', async () => {
    await queue();
    await services.deps.db.update(jobs).set({ kind: 'from_the_future' });
    expect(await runNextJob(workerOf(notingHandlers().handlers))).toBe(false);
    expect(await findJob()).toMatchObject({ state: 'queued', attempts: 0 });
  });
});

describe('runWorker', () => {
  it('does what is queued, is seen alive, and stops when told', async () => {
    const scoreIds = [await queue(), await queue(), await queue()];
    const { ran, handlers } = notingHandlers();
    const stop = new AbortController();
    const mailer = createSmtpMailer(getConfig().mail);
    const worker = runWorker({ id: 'w2', deps: services.deps, mailer, handlers, slots: 2, signal: stop.signal });
    while (ran.length < 3) await sleep(20);
    expect(await hasHeartbeatSince(services.deps.db, services.deps.now())).toBe(true);
    stop.abort();
    await worker;
    mailer.close();
    expect([...ran].sort()).toEqual([...scoreIds].sort());
    expect(await hasHeartbeatSince(services.deps.db, new Date(0))).toBe(false);
  });
});
