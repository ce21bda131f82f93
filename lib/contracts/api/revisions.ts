import { z } from 'zod';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { listParameter, programParameter } from '@/lib/contracts/api/parameters';
import { reasonSchema } from '@/lib/contracts/codes';
import { LIST_BYTES } from '@/lib/ingest/limits';

export const revisionQuerySchema = z.strictObject({
  reason: reasonSchema
    .default('Uploaded through the API')
    .describe('Why there is a new revision; kept with it, at most 1000 characters'),
});

export const acceptedSchema = z
  .object({
    import: z.string().describe('Identifier of the import'),
    url: z.string().describe('Where to ask how it stands'),
  })
  .meta({ id: 'AcceptedImport', description: 'A file that is stored and waits to be read' });

export const addRevisionEndpoint = {
  method: 'post',
  path: '/programs/{program}/lists/{list}/revisions',
  operationId: 'addRevision',
  summary: 'Upload a CSV as the next revision of a list',
  description:
    "Stores the file and queues it; reading it makes the next revision, whole or not at all. Headings other than the contract's " +
    'are read as someone mapped them in the browser for this list, which the import then says. Ask the `url` of the answer how it ' +
    'stands. A person may have four imports under way; a fifth answers 429. With an Idempotency-Key a request can be sent again ' +
    'safely: the same file and reason to the same list give the same answer and no second revision.',
  scope: 'lists:write',
  pathParameters: z.object({ program: programParameter, list: listParameter }),
  query: revisionQuerySchema,
  headers: z.object({
    'Idempotency-Key': z
      .string()
      .min(1)
      .max(255)
      .optional()
      .describe("Of the caller's choice, e.g. a UUID, new for each new request; remembered for 24 hours"),
    'X-File-Name': z
      .string()
      .optional()
      .describe('Name of the file, percent-encoded UTF-8; shown with the revision'),
  }),
  body: {
    type: 'text/csv',
    description: 'A component mass list: UTF-8, one header row, comma, semicolon or tab. At most 1 GiB',
    maxBytes: LIST_BYTES,
    example: 'item,mass,x,y,z\nSPAR-F,212.5,0.31,0,0.02\n',
  },
  answers: {
    202: {
      description: 'Stored, and waiting to be read',
      schema: acceptedSchema,
      headers: { Location: 'The same as `url`' },
      example: {
        import: '5f0c7a52-9a55-4d52-8d0e-6f5a3a1f2c11',
        url: 'https://polhode.example/api/v1/imports/5f0c7a52-9a55-4d52-8d0e-6f5a3a1f2c11',
      },
    },
  },
  problems: [
    'invalid-request',
    'forbidden',
    'not-found',
    'length-required',
    'too-large',
    'unsupported-media-type',
    'invalid-input',
    'unavailable',
  ],
} as const satisfies Endpoint;
