import { type Metadata } from 'next';
import { viewsAsked } from '@/components/three-views/views-address';
import { VIEWS_KEYS } from '@/components/three-views/views-keys';
import { ViewsSheet } from '@/components/three-views/views-sheet';
import { Caution } from '@/components/ui/caution';
import { EmptyPlace } from '@/components/ui/empty-place';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { orShow, requireProgram } from '@/lib/server/http/page';
import { baselineSource } from '@/lib/server/three-views/sources';
import { loadViews } from '@/lib/server/three-views/load-views';
import { ProgramFrame } from '../../../frame';

export const metadata: Metadata = { title: 'Three views' };

/** Where the components of a signed baseline are: the rows of its revisions, so for those who may read lists. */
export default async function BaselineViewsPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/baselines/[baseline]/views'>) {
  const { baseline: number, program: programCode } = await params;
  const access = await requireProgram(programCode, 'lists.read');
  const home = `/programs/${access.program.code}`;
  const source = await orShow(() => baselineSource(serverDb(), access.program.id, number));
  const view = viewsAsked(await searchParams);
  const views = await loadViews(serverDb(), source, view);
  return (
    <ProgramFrame access={access} current="baselines" keys={VIEWS_KEYS}>
      <PageHead
        title="Three views"
        above={<TextLink href={`${home}/baselines/${number}`}>{source.title}</TextLink>}
        lead={`${views?.condition.title ?? 'No condition'}, frame issue ${source.frameIssue}`}
      />
      {views === null ? (
        <EmptyPlace title="There is nothing to draw">
          <p>This baseline holds no condition.</p>
        </EmptyPlace>
      ) : (
        <ViewsSheet
          {...views}
          path={`${home}/baselines/${number}/views`}
          view={view}
          listsHref={`${home}/lists`}
          exportName={`baseline-${number}-${views.condition.code}-places.csv`}
        />
      )}
      <Caution />
    </ProgramFrame>
  );
}
