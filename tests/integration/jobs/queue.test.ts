import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { eq } from 'drizzle-orm';
import { claimJobs, finishJob, renewLease, returnJobs } from '@/db/queries/jobs';
import { jobs } from '@/db/schema';
import { enqueue } from '@/lib/jobs/queue';
import { type TestServices, openServices } from '../../support/services';

let services: TestServices;
beforeAll(async () => void (services = await openServices()));
afterAll(() => services.close());
beforeEach(async () => void (await services.deps.db.delete(jobs)));

const MINUTE = 60_000;

function queue(scoreId = services.deps.newId()) {
  const { db, newId, now } = services.deps;
  return enqueue(db, 'read_score', { scoreId }, { id: newId(), now: now() });
}

function claim(workerId: string, limit: number) {
  const { deps } = services;
  return claimJobs(deps.db, { workerId, kinds: ['read_score'] }, limit, deps.now(), new Date(deps.now().getTime() + MINUTE));
}

describe('claimJobs', () => {
  it('gives each job to one of many workers that ask at once', async () => {
    for (let n = 0; n < 12; n += 1) await queue();
    const claims = await Promise.all(['a', 'b', 'c', 'd'].map((workerId) => claim(workerId, 5)));
    const ids = claims.flat().map((job) => job.id);
    expect(new Set(ids).size).toBe(ids.length);
    const rest = await claim('e', 12);
    expect(ids.length + rest.length).toBe(12);
  });

  it('gives nothing before its time', async () => {
    const { db, newId, now } = services.deps;
    const runAfter = new Date(now().getTime() + MINUTE);
    await enqueue(db, 'read_score', { scoreId: newId() }, { id: newId(), now: now(), runAfter });
    expect(await claim('a', 1)).toEqual([]);
    services.clock.forward(MINUTE);
    expect(await claim('a', 1)).toHaveLength(1);
  });

  it('gives a job again when its lease ran out, and counts the attempt', async () => {
    await queue();
    const [first] = await claim('a', 1);
    expect(first?.attempt).toBe(1);
    expect(await claim('b', 1)).toEqual([]);
    services.clock.forward(MINUTE + 1);
    const [second] = await claim('b', 1);
    expect(second).toMatchObject({ id: first?.id, attempt: 2 });
  });

  it('gives nothing again while the lease is renewed', async () => {
    await queue();
    const [job] = await claim('a', 1);
    services.clock.forward(MINUTE - 1);
    await renewLease(services.deps.db, job?.id ?? '', 'a', new Date(services.deps.now().getTime() + MINUTE));
    services.clock.forward(MINUTE - 1);
    expect(await claim('b', 1)).toEqual([]);
  });
});

describe('finishJob', () => {
  it('ignores a worker that lost its lease', async () => {
    await queue();
    const [job] = await claim('a', 1);
    services.clock.forward(MINUTE + 1);
    await claim('b', 1);
    await finishJob(services.deps.db, job?.id ?? '', 'a', services.deps.now());
    const [row] = await services.deps.db.select({ state: jobs.state, leasedBy: jobs.leasedBy }).from(jobs);
    expect(row).toEqual({ state: 'running', leasedBy: 'b' });
  });
});

describe('returnJobs', () => {
  it('puts a job back without counting the attempt', async () => {
    await queue();
    const [job] = await claim('a', 1);
    await returnJobs(services.deps.db, [job?.id ?? ''], 'a', services.deps.now());
    expect(await claim('b', 1)).toMatchObject([{ id: job?.id, attempt: 1 }]);
  });
});

describe('enqueue', () => {
  it('adds the same work once until it has ended', async () => {
    const scoreId = services.deps.newId();
    await queue(scoreId);
    await queue(scoreId);
    const claimed = await claim('a', 5);
    expect(claimed).toHaveLength(1);
    await finishJob(services.deps.db, claimed[0]?.id ?? '', 'a', services.deps.now());
    await queue(scoreId);
    const states = await services.deps.db.select({ state: jobs.state }).from(jobs).where(eq(jobs.kind, 'read_score'));
    expect(states.map(({ state }) => state).sort()).toEqual(['done', 'queued']);
  });

  it('refuses a payload that is not the kind’s', async () => {
    const { db, newId, now } = services.deps;
    await expect(enqueue(db, 'read_score', { scoreId: 'not an id' }, { id: newId(), now: now() })).rejects.toThrow();
  });
});
