/** The object store's fake: an S3 server on loopback that keeps its objects as files. Usage: objects.mjs PORT FOLDER BUCKET */
import S3rver from 's3rver';

const [port, directory, bucket] = process.argv.slice(2);

const server = new S3rver({
  port: Number(port),
  address: '127.0.0.1',
  directory,
  silent: true,
  configureBuckets: [{ name: bucket }],
});
await server.run();

for (const signal of ['SIGTERM', 'SIGINT']) process.on(signal, () => process.exit(0));
