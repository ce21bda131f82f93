import { ensureBucket } from '@/lib/server/storage/bucket';
import { migrate } from './schema';

// What must be there before the server: the schema, the application role's rights, the bucket.
await Promise.all([migrate(), ensureBucket()]);
