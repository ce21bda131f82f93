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
import { configurationSource } from '@/lib/server/three-views/sources';
import { loadViews } from '@/lib/server/three-views/load-views';
import { ProgramFrame } from '../../../frame';

export const metadata: Metadata = { title: 'Three views' };

/** Where the components of a configuration are, as it is pinned now. */
export default async function ConfigurationViewsPage({
  params,
  searchParams,
}: PageProps<'/programs/[program]/configurations/[configuration]/views'>) {
  const { configuration: code, program: programCode } = await params;
  const access = await requireProgram(programCode, 'configurations.read');
  const home = `/programs/${access.program.code}`;
  const source = await orShow(() => configurationSource(serverDb(), access.program.id, code));
  const view = viewsAsked(await searchParams);
  const views = await loadViews(serverDb(), source, view);
  return (
    <ProgramFrame access={access} current="configurations" keys={VIEWS_KEYS}>
      <PageHead
        title="Three views"
        above={<TextLink href={`${home}/configurations/${code}`}>{source.title}</TextLink>}
        lead={`${views?.condition.title ?? 'No condition yet'}, frame issue ${source.frameIssue}`}
      />
      {views === null ? (
        <EmptyPlace title="There is nothing to draw yet">
          <p>Choose list revisions and add a condition first; then their components are drawn here.</p>
        </EmptyPlace>
      ) : (
        <ViewsSheet
          {...views}
          path={`${home}/configurations/${code}/views`}
          view={view}
          listsHref={`${home}/lists`}
          exportName={`${code}-${views.condition.code}-places.csv`}
        />
      )}
      <Caution />
    </ProgramFrame>
  );
}
