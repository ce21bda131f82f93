import { type Metadata } from 'next';
import { mappingOfImport } from '@/db/queries/mappings';
import { HowItWasRead } from '@/components/lists/mapping/how-it-was-read';
import { ImportWatch } from '@/components/lists/import-watch';
import { QueryRoot } from '@/components/lists/query-root';
import { PageHead } from '@/components/ui/section';
import { TextLink } from '@/components/ui/text-link';
import { serverDb } from '@/lib/server/database';
import { importOf } from '@/lib/server/lists/import-view';
import { reachImport } from '@/lib/server/lists/reach-list';
import { ProgramFrame } from '../../../../frame';
import { orNotFound, requireList } from '../../list-page';

export const metadata: Metadata = { title: 'Import' };

/** One file on its way into a list: how far it is, what became of it. */
export default async function ImportPage({
  params,
}: PageProps<'/programs/[program]/lists/[list]/imports/[import]'>) {
  const { access, list, listHref, route } = await requireList(params, 'lists.read');
  const { import: id } = await params;
  const found = importOf(await orNotFound(() => reachImport(serverDb(), list, id)), list, new Date());
  const mapped = await mappingOfImport(serverDb(), found.import);
  return (
    <ProgramFrame access={access} current="lists">
      <PageHead
        title={found.file}
        above={<TextLink href={listHref}>{list.title}</TextLink>}
        lead={found.reason}
      />
      <QueryRoot>
        <ImportWatch
          initial={found}
          from={`${route}/imports/${found.import}`}
          listHref={listHref}
          mayUpload={access.can('lists.keep')}
        />
      </QueryRoot>
      {mapped === undefined ? null : (
        <HowItWasRead
          mapping={mapped.mapping}
          author={mapped.author}
          at={mapped.created_at}
          leftOut={mapped.left_out}
          totals={mapped.totals}
          acceptTotals={mapped.accept_totals}
        />
      )}
    </ProgramFrame>
  );
}
