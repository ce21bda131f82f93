import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';

import { REMOVAL_RULES } from '@/lib/findings/removals/rules';
import { ROTOR_RULES, ROW_RULES, WHOLE_RULES } from '@/lib/findings/rules';

/** What the tests say, this one left out. */
const tests = join(import.meta.dirname, '..');
const texts = readdirSync(tests, { recursive: true, encoding: 'utf8' })
  .filter((name) => name.endsWith('.test.ts') && !name.endsWith('every-rule.test.ts'))
  .map((name) => readFileSync(join(tests, name), 'utf8'))
  .join('\n');

describe('every rule', () => {
  const ids = [...ROW_RULES, ...WHOLE_RULES, ...ROTOR_RULES, ...REMOVAL_RULES].map(({ id }) => id);

  it.each(ids)('%s stands in a test that names it', (id) => {
    expect(texts).toMatch(new RegExp(`[' ]${id}'`));
  });
});
