import Papa from 'papaparse';
import { expect, it } from 'vitest';
import example from '@/lib/contracts/api/baseline-example.json';
import { readStoredDocument } from '@/lib/baselines/stored-document';
import { baselineCsv } from '@/lib/export/baseline-csv';
import { OUTPUT_UNITS } from '@/lib/units/names';

const rowsOf = (document: object): Record<string, string>[] => {
  const text = baselineCsv({
    document: readStoredDocument(JSON.stringify(document)),
    units: OUTPUT_UNITS.si,
    digest: 'sha256:00',
    state: 'superseded',
  });
  return Papa.parse<Record<string, string>>(text, { header: true, skipEmptyLines: true }).data;
};

it('leaves empty what a condition does not have: nothing beside its mass where that is zero or less', () => {
  const { code, title } = example.conditions[0] ?? { code: '', title: '' };
  const nothing = { code, title, basis: 'basic', mass: -3, predictedMass: -3, predicted: { mass: -3 } };
  const [row = {}] = rowsOf({ ...example, conditions: [nothing] });
  const filled = Object.entries(row).filter(([name, text]) => /_(kg|m|kg_m2|mac|share)$/.test(name) && text);
  expect(filled).toEqual([
    ['mass_kg', '-3'],
    ['predicted_mass_kg', '-3'],
  ]);
});

it('quotes texts with commas, quotes and line ends, and guards formulas', () => {
  const [condition] = example.conditions;
  const rows = rowsOf({
    ...example,
    marking: 'Skerry, "B"\nkeep',
    conditions: [{ ...condition, title: '@SUM(1)' }],
  });
  expect(rows[0]).toMatchObject({ marking: 'Skerry, "B"\nkeep', title: "'@SUM(1)", state: 'superseded' });
});
