import { startS3Fake } from './server';

// Arguments: port and folder. The credentials it takes are those of S3_ACCESS_KEY_ID and S3_SECRET_ACCESS_KEY.
const [port, folder] = process.argv.slice(2);
const accessKeyId = process.env['S3_ACCESS_KEY_ID'];
const secretAccessKey = process.env['S3_SECRET_ACCESS_KEY'];
if (!port || !folder || !accessKeyId || !secretAccessKey) {
  throw new Error('Needed: port, folder, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY.');
}
const fake = await startS3Fake({ port: Number(port), folder, credentials: { accessKeyId, secretAccessKey } });
process.on('SIGTERM', () => void fake.close().then(() => process.exit(0)));
process.send?.('ready');
