import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  PutObjectCommand,
  S3Client,
  S3ServiceException,
} from '@aws-sdk/client-s3';
import type { StoreConfig } from '@/lib/config';
import { type ObjectStore, StoreError, sha256Of } from './object-store';

const CONNECT_WITHIN_MS = 5_000;
const ANSWER_WITHIN_MS = 30_000;
const CHECK_WITHIN_MS = 10_000;
const SHA256 = /^[0-9a-f]{64}$/;

function createClient(config: StoreConfig): S3Client {
  return new S3Client({
    region: config.region,
    forcePathStyle: config.forcePathStyle,
    ...(config.endpoint ? { endpoint: config.endpoint } : {}),
    // A copy: the client writes into what it is given.
    ...(config.credentials ? { credentials: { ...config.credentials } } : {}),
    // The default adds trailing checksums, which S3-compatible stores have written into the object; we check our own.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
    maxAttempts: 3,
    requestHandler: { connectionTimeout: CONNECT_WITHIN_MS, requestTimeout: ANSWER_WITHIN_MS },
  });
}

/** Two leading digits as a folder: object listings and file systems stay readable. */
function keyOf(sha256: string): string {
  if (!SHA256.test(sha256)) throw new StoreError('not a SHA-256');
  return `files/${sha256.slice(0, 2)}/${sha256}`;
}

function isMissing(error: unknown): boolean {
  const status = error instanceof S3ServiceException ? error.$metadata.httpStatusCode : undefined;
  return status === 404 && error instanceof Error && error.name !== 'NoSuchBucket';
}

async function asking<T>(verb: string, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (cause) {
    throw cause instanceof StoreError ? cause : new StoreError(`the object store did not ${verb}`, { cause });
  }
}

/** As `asking`, with null for an object that is not there. */
function askingMaybe<T>(verb: string, work: () => Promise<T>): Promise<T | null> {
  return asking(verb, async () => {
    try {
      return await work();
    } catch (error) {
      if (isMissing(error)) return null;
      throw error;
    }
  });
}

/** An object store behind the S3 interface. */
export function createS3Store(config: StoreConfig): ObjectStore {
  const client = createClient(config);
  const { bucket: Bucket } = config;

  async function fetchObject(sha256: string): Promise<Uint8Array<ArrayBuffer>> {
    const { Body } = await client.send(new GetObjectCommand({ Bucket, Key: keyOf(sha256) }));
    if (!Body) throw new StoreError('the object store sent no body');
    const bytes = new Uint8Array(await Body.transformToByteArray());
    if (sha256Of(bytes) !== sha256) throw new StoreError('the object store sent other bytes than were stored');
    return bytes;
  }

  return {
    async put(sha256, bytes, type) {
      if (sha256Of(bytes) !== sha256) throw new StoreError('the bytes do not have this SHA-256');
      const command = new PutObjectCommand({ Bucket, Key: keyOf(sha256), Body: bytes, ContentType: type });
      await asking('keep a file', () => client.send(command));
    },
    get: (sha256) => askingMaybe('send a file', () => fetchObject(sha256)),
    async exists(sha256) {
      const command = new HeadObjectCommand({ Bucket, Key: keyOf(sha256) });
      return (await askingMaybe('look for a file', () => client.send(command))) !== null;
    },
    async remove(sha256) {
      const command = new DeleteObjectCommand({ Bucket, Key: keyOf(sha256) });
      await askingMaybe('remove a file', () => client.send(command));
    },
    async check() {
      const abortSignal = AbortSignal.timeout(CHECK_WITHIN_MS);
      await asking('answer', () => client.send(new HeadBucketCommand({ Bucket }), { abortSignal }));
    },
  };
}
