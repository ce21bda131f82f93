import { type Finding } from '@/lib/findings/finding';
import { bySeverity, findingsOnWhole, RowChecks } from '@/lib/findings/look';
import { type Problem } from '@/lib/ingest/problem';
import { readMassListBlocks } from '@/lib/ingest/read-blocks';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type RollUp } from '@/lib/mass/roll-up';
import { StatelessRollUp } from '@/lib/mass/stateless';

/** What a list that belongs to no program amounts to. SI; the airframe frame has the list's own axis words. */
export interface ListRollUp {
  readonly rollUp: RollUp;
  readonly geometry: AirframeGeometry;
  /** On rows and on the whole, blockers first. */
  readonly findings: readonly Finding[];
}

/** A file with errors has no roll-up: the first 200 problems, and the number of every kind. */
export interface WrongList {
  readonly problems: readonly Problem[];
  readonly problemCounts: Readonly<Record<string, number>>;
}

/**
 * Reads one mass list and rolls it up in one pass, keeping subtotals and not rows. Errors of the byte stream pass through.
 */
export async function rollUpList(
  bytes: AsyncIterable<Uint8Array>,
  declarations: ListDeclarations,
): Promise<ListRollUp | WrongList> {
  const sum = new StatelessRollUp(declarations);
  const checks = new RowChecks(declarations);
  const { problems, problemCounts } = await readMassListBlocks(bytes, declarations, {
    onBlock(block) {
      sum.addRows(block);
      checks.seeBlock(block);
    },
  });
  if (problems.length > 0) return { problems, problemCounts };
  const rollUp = sum.result();
  const findings = [...checks.findings(), ...findingsOnWhole(rollUp, sum.geometry)].sort(bySeverity);
  return { rollUp, geometry: sum.geometry, findings };
}
