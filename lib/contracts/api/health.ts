import { z } from 'zod';
import { type Endpoint } from '@/lib/contracts/api/endpoint';

export const healthSchema = z
  .object({
    live: z.literal(true).describe('The process answers'),
    ready: z.literal(true).describe('Database and file store answer it'),
  })
  .meta({ id: 'Health' });

export const healthEndpoint = {
  method: 'get',
  path: '/health',
  operationId: 'health',
  summary: 'Ask whether the service lives and is ready',
  description:
    'Any answer says that the process lives; 200 says that it can work, 503 that the database or the file store does not answer.',
  scope: null,
  answers: {
    200: { description: 'Live and ready', schema: healthSchema, example: { live: true, ready: true } },
  },
  problems: ['unavailable'],
} as const satisfies Endpoint;
