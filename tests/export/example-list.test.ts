import { describe, expect, it } from 'vitest';
import { declarationsFromBody, listDeclarationsSchema } from '@/lib/contracts/list-declarations';
import { exampleList } from '@/lib/export/example-list';
import { RowChecks } from '@/lib/findings/look';
import { readMassList } from '@/lib/ingest/mass-list';

describe('The example file', () => {
  it('reads without a problem, raises no blocker, and its assembly is the sum of its parts', async () => {
    const declarations = declarationsFromBody(
      listDeclarationsSchema.parse({ mass_unit: 'kg', length_unit: 'm', inertia_unit: 'kg.m2' }),
    );
    const checks = new RowChecks(declarations);
    const masses = new Map<string | null, number>();
    async function* bytes() {
      yield new TextEncoder().encode(exampleList());
    }
    const reading = await readMassList(bytes(), declarations, {
      onComponent: (component) => {
        checks.see(component);
        masses.set(component.item, component.mass);
        if (component.parent !== null) masses.set('parts', (masses.get('parts') ?? 0) + component.mass);
      },
    });
    expect(reading).toMatchObject({ rows: 9, problems: [], unknownColumns: [] });
    expect(masses.get('parts')).toBeCloseTo(masses.get('DN40-P-0000') ?? NaN, 9);
    expect(checks.findings().filter(({ severity }) => severity === 'blocker')).toEqual([]);
  });
});
