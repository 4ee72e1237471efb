import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { startFakes } from '../../docker-free-fakes/fakes.mjs';

/** One fresh MariaDB, object store and mail sink for a run of the integration tests; they leave nothing behind. */
export default async function setup(): Promise<() => Promise<void>> {
  const dataDir = await mkdtemp(path.join(tmpdir(), 'understave-test-'));
  const fakes = await startFakes(dataDir, { throwaway: true });
  // Test files run in processes that are forked later and inherit this; lib/config.ts reads it there as anywhere.
  Object.assign(process.env, fakes.env, { APP_URL: 'http://understave.test', LOG_LEVEL: 'silent' });
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED = 'true';
  return async () => {
    await fakes.stop();
    await rm(dataDir, { recursive: true, force: true });
  };
}
