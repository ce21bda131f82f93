import { type z } from 'zod';

type Issue = z.core.$ZodRawIssue;

const NOUNS: Readonly<Record<string, string>> = {
  string: 'a text',
  number: 'a number',
  int: 'a whole number',
  boolean: 'true or false',
  array: 'an array',
  object: 'an object',
  record: 'an object',
  date: 'a date',
};

const noun = (type: string): string => NOUNS[type] ?? type;

/**
 * What a client is told of an input that a schema refuses, where the schema itself has no words for it. For zod's `error` option of
 * a parse; undefined leaves zod's own words.
 */
export function inputWords(issue: Issue): string | undefined {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined ? 'This is missing.' : `This must be ${noun(issue.expected)}.`;
    case 'invalid_value':
      return issue.values.length === 1
        ? `This must be ${String(issue.values[0])}.`
        : `This must be one of ${issue.values.map(String).join(', ')}.`;
    case 'too_small':
      return bound(
        issue.origin,
        `at least ${String(issue.minimum)}`,
        `more than ${String(issue.minimum)}`,
        issue.inclusive,
      );
    case 'too_big':
      return bound(
        issue.origin,
        `at most ${String(issue.maximum)}`,
        `less than ${String(issue.maximum)}`,
        issue.inclusive,
      );
    case 'unrecognized_keys':
      return `There is no such member here: ${issue.keys.join(', ')}.`;
    default:
      return undefined;
  }
}

function bound(origin: string, closed: string, open: string, inclusive = true): string {
  if (origin === 'string') return `This must have ${closed} characters.`;
  if (origin === 'array' || origin === 'set') return `This must have ${closed} entries.`;
  return `This must be ${inclusive ? closed : open}.`;
}
