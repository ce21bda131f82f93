export interface TestWeb {
  readonly url: string;
  /** Its database, as the application's role and as the owner. */
  readonly appUrl: string;
  readonly ownerUrl: string;
}

/** The running server that the tests in tests/browser and tests/api share, as `web.setup.ts` has left it in the environment. */
export function testWeb(): TestWeb {
  const text = process.env['POLHODE_TEST_WEB'];
  if (!text) throw new Error('No running server: only tests in tests/browser and tests/api have one.');
  return JSON.parse(text) as TestWeb;
}
