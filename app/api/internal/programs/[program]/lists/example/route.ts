import { exampleList } from '@/lib/export/example-list';
import { attachment, CSV_TYPE } from '@/lib/server/http/attachment';
import { programRoute } from '@/lib/server/http/internal-route';

/** A short mass list to begin with. */
export const GET = programRoute('lists.read', async () =>
  attachment(exampleList(), { name: 'dunlin-40-example.csv', type: CSV_TYPE }),
);
