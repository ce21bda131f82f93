import { createTestDatabase } from './database';
import { type TestWeb } from './web';
import { startWeb } from './web-server';

/** Builds and starts the application once for all browser and API tests, on a migrated, empty database. */
export default async function setup(): Promise<() => Promise<void>> {
  const database = await createTestDatabase();
  const web = await startWeb('web', database.appUrl);
  const shared: TestWeb = { url: web.url, appUrl: database.appUrl, ownerUrl: database.ownerUrl };
  process.env['POLHODE_TEST_WEB'] = JSON.stringify(shared);
  return async () => {
    await web.stop();
    await database.drop();
  };
}
