import { randomBytes } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { getConfig } from '@/lib/config';
import { StoreError, sha256Of } from '@/lib/storage/object-store';
import { createS3Store } from '@/lib/storage/s3-store';

const MXL = 'application/vnd.recordare.musicxml';

describe('createS3Store', () => {
  const store = createS3Store(getConfig().store);

  it('gives back the bytes it was given', async () => {
    const bytes = new Uint8Array(randomBytes(3_000_000));
    const sha256 = sha256Of(bytes);
    await store.put(sha256, bytes, MXL);
    const back = await store.get(sha256);
    expect(back && sha256Of(back)).toBe(sha256);
    expect(await store.exists(sha256)).toBe(true);
  });

  it('says null of a file that is not there', async () => {
    expect(await store.get(sha256Of(randomBytes(8)))).toBeNull();
    expect(await store.exists(sha256Of(randomBytes(8)))).toBe(false);
  });

  it('takes the same file twice and removes it once', async () => {
    const bytes = new Uint8Array(randomBytes(64));
    const sha256 = sha256Of(bytes);
    await store.put(sha256, bytes, MXL);
    await store.put(sha256, bytes, MXL);
    await store.remove(sha256);
    await store.remove(sha256);
    expect(await store.get(sha256)).toBeNull();
  });

  it('refuses bytes under a name that is not their own', async () => {
    await expect(store.put(sha256Of(randomBytes(8)), new Uint8Array(8), MXL)).rejects.toThrow(StoreError);
    await expect(store.put('../elsewhere', new Uint8Array(8), MXL)).rejects.toThrow(StoreError);
  });

  it('says so when the bucket is not there', async () => {
    const elsewhere = createS3Store({ ...getConfig().store, bucket: 'no-such-bucket' });
    await expect(elsewhere.check()).rejects.toThrow(StoreError);
    await expect(elsewhere.get(sha256Of(randomBytes(8)))).rejects.toThrow(StoreError);
    await store.check();
  });
});
