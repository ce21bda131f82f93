import Papa from 'papaparse';
import { NEEDED_COLUMNS } from '@/lib/ingest/mass-list/columns';

/** What the first bytes of a chosen file promise: the contract's own headings, others, or a workbook. The server looks again. */
export type Peek = 'contract' | 'other' | 'workbook';

const PEEKED_BYTES = 64 * 1024;

export async function peekFile(file: Blob): Promise<Peek> {
  const start = new Uint8Array(await file.slice(0, PEEKED_BYTES).arrayBuffer());
  if ((start[0] === 0x50 && start[1] === 0x4b) || (start[0] === 0xd0 && start[1] === 0xcf)) return 'workbook';
  const text = new TextDecoder().decode(start).replace(/^\uFEFF/u, '');
  const { data } = Papa.parse<string[]>(text, {
    preview: 1,
    skipEmptyLines: 'greedy',
    delimitersToGuess: [',', ';', '\t'],
  });
  const names = new Set((data[0] ?? []).map((name) => name.trim().toLowerCase()));
  const known = (name: string): boolean => names.has(name);
  const keyed = known('item') || known('part_number');
  return keyed && NEEDED_COLUMNS.every(known) ? 'contract' : 'other';
}
