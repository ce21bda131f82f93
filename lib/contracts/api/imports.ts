import { z } from 'zod';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { importParameter } from '@/lib/contracts/api/parameters';
import { fileErrorSchema } from '@/lib/contracts/api/problem';

export const importSchema = z
  .object({
    import: z.string().describe('Identifier of the import'),
    program: z.string().describe('Code of the program'),
    list: z.string().describe('Code of the list'),
    state: z
      .enum(['waiting', 'running', 'done', 'failed', 'cancelled'])
      .describe('Nothing is kept of one that failed or was cancelled'),
    rows: z.number().int().describe('Rows read so far'),
    ofRows: z.number().int().nullable().describe('Rows in the file: an estimate until it has been read'),
    revision: z.number().int().nullable().describe('Number of the revision it made; null until it is done'),
    mapping: z
      .object({ by: z.string(), at: z.iso.datetime() })
      .nullable()
      .describe(
        "Who told, and when, how the columns of such a file are read, where its headings are not the contract's and the list remembers them; null without",
      ),
    errors: z
      .array(fileErrorSchema)
      .describe('Why it failed: the first 200. Then the list keeps the revision it had'),
    errorCounts: z.record(z.string(), z.number().int()).describe('How many errors there are of each kind'),
  })
  .meta({ id: 'Import', description: 'How the reading of an uploaded file stands' });

export const importEndpoint = {
  method: 'get',
  path: '/imports/{id}',
  operationId: 'readImport',
  summary: 'See how an import stands',
  description: 'For tokens that reach the program of the list, of people who may read its lists.',
  scope: 'lists:write',
  pathParameters: z.object({ id: importParameter }),
  answers: {
    200: {
      description: 'The import',
      schema: importSchema,
      example: {
        import: '5f0c7a52-9a55-4d52-8d0e-6f5a3a1f2c11',
        program: 'dunlin-40',
        list: 'wing-structure',
        state: 'failed',
        rows: 12,
        ofRows: 12,
        revision: null,
        mapping: null,
        errors: [
          {
            kind: 'not-a-number',
            line: 7,
            column: 'mass',
            found: '12.5 kg',
            message:
              '`12.5 kg` is not a number. Write the number alone; units are declared once for the list.',
          },
        ],
        errorCounts: { 'not-a-number': 1 },
      },
    },
  },
  problems: ['forbidden', 'not-found'],
} as const satisfies Endpoint;
