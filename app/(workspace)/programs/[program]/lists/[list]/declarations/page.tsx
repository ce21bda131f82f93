import { type Metadata } from 'next';
import { exampleRow } from '@/db/queries/example-row';
import { findRevision } from '@/db/queries/lists';
import { programFrames } from '@/db/queries/program-frames';
import { CarryForm } from '@/components/lists/carry-form';
import { ListForm } from '@/components/lists/list-form';
import { PageHead, Section } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { declarationsToBody } from '@/lib/contracts/list-declarations';
import { listFormValues } from '@/lib/contracts/list-form';
import { typedExample } from '@/lib/server/lists/typed-example';
import { serverDb } from '@/lib/server/database';
import { carryReason } from '@/lib/server/lists/carry-list';
import { ProgramFrame } from '../../../frame';
import { carryListAction, declareListAction } from '../../actions';
import { requireList } from '../list-page';

export const metadata: Metadata = { title: 'Change declarations' };

export default async function DeclarationsPage({
  params,
}: PageProps<'/programs/[program]/lists/[list]/declarations'>) {
  const { access, list, listHref } = await requireList(params, 'lists.keep');
  const db = serverDb();
  const [frames, newest] = await Promise.all([
    programFrames(db, access.program.id),
    findRevision(db, list.id, list.last_revision),
  ]);
  const row = newest && (await exampleRow(db, newest.id));
  const issue = frames.issue(list.frame_issue_id);
  const stated = frames.issue((newest ?? list).frame_issue_id);
  const [inForce] = frames.issues;
  const isBehind = inForce !== undefined && (issue.id !== inForce.id || stated.id !== inForce.id);
  return (
    <ProgramFrame access={access} current="lists" width="narrow">
      <PageHead
        title="Change declarations"
        above={<TextLink href={listHref}>{list.title}</TextLink>}
        lead={
          list.last_revision === 0
            ? 'They say what the figures of the first file mean.'
            : `They apply to the next file that is uploaded. Revisions 1 to ${list.last_revision} keep what they were read with, and so do edits made from them. The title and the marking change at once.`
        }
      />
      <ListForm
        action={declareListAction}
        program={access.program.code}
        list={list.code}
        values={{
          ...listFormValues(list.title, declarationsToBody(list.declarations)),
          frame_issue: String(issue.number),
        }}
        cancelHref={listHref}
        issues={frames.issues.map((each) => ({ ...each, ...frames.geometry(each.id) }))}
        example={newest && row ? typedExample(row, newest.declarations) : null}
      />
      {isBehind ? (
        <Section
          title={`Carry to frame issue ${inForce.number}`}
          lead={`The list is stated in frame issue ${stated.number}; issue ${inForce.number}, ${inForce.title}, is in force. Where it stands, it is converted at each roll-up. Carried, its origin and turn are stated anew from the new datum, its rows stay as they are, and results do not change.`}
        >
          <CarryForm
            action={carryListAction}
            fields={{
              program: access.program.code,
              list: list.code,
              newest: String(list.last_revision),
              frame_issue: String(inForce.number),
            }}
            to={inForce.number}
            reason={carryReason(stated.number, inForce.number)}
          />
        </Section>
      ) : null}
    </ProgramFrame>
  );
}
