import { limitName, QUANTITY_WORDS, siUnit } from '@/lib/loading/limit-words';
import { LIMIT_KINDS, type LimitStanding } from '@/lib/loading/limits';

import { type PlacedFinding } from '../finding';
import { type Rule } from '../rule';
import { counted, shown } from '../watch';
import { LIMIT_RULES, limitNotJudged } from './rules';

/**
 * One finding for each kind of limit that a condition is beyond, basic or predicted; `rows` names the groups concerned, none for
 * the whole aircraft. A limit about another condition than those judged says nothing of them.
 */
export function findingsOnLimits(standings: readonly LimitStanding[]): PlacedFinding[] {
  const conditions = [...new Set(standings.map(({ condition }) => condition.code))];
  return conditions.flatMap((code) => {
    const here = standings.filter(({ condition }) => condition.code === code);
    const beyond = here.filter(({ verdict }) => verdict === 'beyond' || verdict === 'predicted-beyond');
    return [
      ...LIMIT_KINDS.flatMap((kind) =>
        finding(
          LIMIT_RULES[kind],
          code,
          beyond.filter(({ limit }) => limit.kind === kind),
          (count) => counted(count, `figure is beyond its ${kind}`, `figures are beyond their ${kind}`),
          beyondWords,
        ),
      ),
      ...finding(
        limitNotJudged,
        code,
        here.filter(({ verdict }) => verdict === 'not-judged'),
        (count) => counted(count, 'limit is not judged', 'limits are not judged'),
        ({ limit, obstacle }) => `${limitName(limit)}, ${limit.source}: ${obstacle ?? ''}`,
      ),
    ];
  });
}

function finding(
  { id, severity }: Rule,
  code: string,
  seen: readonly LimitStanding[],
  headline: (count: number) => string,
  words: (standing: LimitStanding) => string,
): PlacedFinding[] {
  if (seen.length === 0) return [];
  const message = [`${headline(seen.length)}.`, ...seen.map(words).map(asSentence)].join(' ');
  const rows = [...new Set(seen.map(({ limit }) => limit.group))].filter((group) => group !== '');
  return [{ rule: id, severity, message, rows, count: seen.length, where: { kind: 'condition', code } }];
}

function beyondWords({ limit, basic, predicted, margin, verdict }: LimitStanding): string {
  const unit = siUnit(limit.quantity);
  const of = limit.group === '' ? '' : ` of ${limit.group}`;
  const isBasic = verdict === 'beyond';
  const [word, figure, room] = isBasic
    ? ['Basic', basic, margin.basic]
    : ['Predicted', predicted, margin.predicted];
  const allowed = `${limit.sense === 'at-most' ? 'the most' : 'the least'} allowed, ${shown(limit.value)} ${unit}`;
  return (
    `${word} ${QUANTITY_WORDS[limit.quantity]}${of} is ${shown(figure ?? NaN)} ${unit}, ${shown(Math.abs(room ?? NaN))} ${unit} ` +
    `beyond ${allowed} (${limit.source})${isBasic ? '' : '; basic is within'}`
  );
}

function asSentence(words: string): string {
  const begun = `${words.charAt(0).toUpperCase()}${words.slice(1)}`;
  return begun.endsWith('.') ? begun : `${begun}.`;
}
