import { startMailFake } from './server';

// Arguments: SMTP port, port of the web page, folder.
const [smtpPort, webPort, folder] = process.argv.slice(2);
if (!smtpPort || !webPort || !folder) throw new Error('Needed: SMTP port, web port, folder.');
const fake = await startMailFake({ smtpPort: Number(smtpPort), webPort: Number(webPort), folder });
process.on('SIGTERM', () => void fake.close().then(() => process.exit(0)));
process.send?.('ready');
