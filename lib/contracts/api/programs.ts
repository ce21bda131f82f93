import { z } from 'zod';
import { type Endpoint } from '@/lib/contracts/api/endpoint';

export const programsSchema = z.object({
  programs: z
    .array(
      z
        .object({
          program: z.string().describe('Code of the program, as it stands in addresses'),
          title: z.string(),
          builds: z.array(
            z.object({
              build: z.string().describe('Code of the build'),
              title: z.string(),
              default: z.boolean().describe('Whether it is meant where no build is named'),
            }),
          ),
        })
        .meta({ id: 'Program', description: 'One aircraft design and its builds' }),
    )
    .describe("By title; only those that both the token and its owner's roles reach"),
});

export const programsEndpoint = {
  method: 'get',
  path: '/programs',
  operationId: 'listPrograms',
  summary: 'List programs and their builds',
  description: 'The programs that the token reaches and in which its owner has a role today.',
  scope: 'baselines:read',
  answers: {
    200: {
      description: 'Programs by title',
      schema: programsSchema,
      example: {
        programs: [
          {
            program: 'dunlin-40',
            title: 'Dunlin 40',
            builds: [{ build: 'design', title: 'Design', default: true }],
          },
        ],
      },
    },
  },
  problems: [],
} as const satisfies Endpoint;
