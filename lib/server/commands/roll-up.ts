import { parseArgs } from 'node:util';
import { declarationsOfQuery, rollUpAnswer, rollUpQuerySchema } from '@/lib/contracts/api/roll-ups';
import { problemSentence } from '@/lib/ingest/problem-log';
import { rollUpList } from '@/lib/ingest/roll-up-list';
import { fail } from './arguments';
import { fileBytes } from './file-bytes';

const USAGE =
  'npm run -s roll-up -- FILE.csv --mass-unit lb --length-unit in --inertia-unit lb.in2 ' +
  '[--products negative] [--axes aft,right,up] [--units us] ...';

/** Every parameter of the API's roll-up as an option: `mass_unit` is `--mass-unit`. */
const OPTIONS = Object.keys(rollUpQuerySchema.shape).map(
  (name) => [name, name.replaceAll('_', '-')] as const,
);

/**
 * Rolls up a mass list from a file and prints what POST /api/v1/roll-ups would answer, as JSON; no database, no network. A file
 * with errors prints them, one a line, and ends with 1.
 */
async function main(): Promise<void> {
  const { values, positionals } = parseArgs({
    options: Object.fromEntries(OPTIONS.map(([, option]) => [option, { type: 'string' as const }])),
    allowPositionals: true,
  });
  const [file, ...more] = positionals;
  if (file === undefined || more.length > 0) throw new Error(`Name one file. ${USAGE}`);
  const given = OPTIONS.flatMap(([name, option]) => {
    const value = values[option];
    return value === undefined ? [] : [[name, value] as const];
  });
  const query = rollUpQuerySchema.safeParse(Object.fromEntries(given));
  if (!query.success) {
    const wrong = query.error.issues.map(
      (issue) => `--${String(issue.path[0]).replaceAll('_', '-')}: ${issue.message}`,
    );
    throw new Error(`${wrong.join('\n')}\n${USAGE}`);
  }
  const declarations = declarationsOfQuery(query.data);
  const rolled = await rollUpList(fileBytes(file), declarations);
  if ('problems' in rolled) {
    for (const problem of rolled.problems) console.error(problemSentence(problem));
    const count = Object.values(rolled.problemCounts).reduce((sum, one) => sum + one, 0);
    throw new Error(`${file} has ${count} ${count === 1 ? 'problem' : 'problems'}; nothing was rolled up.`);
  }
  console.log(JSON.stringify(rollUpAnswer(rolled, declarations, query.data.units), null, 2));
}

main().catch(fail);
