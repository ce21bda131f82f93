/** Something the person at the terminal can mend: shown as its one line, without a stack. */
export class Failure extends Error {}

/**
 * Runs a command's main function and turns its end into an exit code.
 * @param {() => Promise<number | void>} main
 */
export async function run(main) {
  try {
    process.exitCode = (await main()) ?? 0;
  } catch (error) {
    if (!(error instanceof Failure)) throw error;
    console.error(`\n${error.message}`);
    process.exitCode = 1;
  }
}
