import { z } from 'zod';
import { type Endpoint } from '@/lib/contracts/api/endpoint';

export const openapiEndpoint = {
  method: 'get',
  path: '/openapi.json',
  operationId: 'openapi',
  summary: 'This document',
  description: 'OpenAPI 3.1 of every endpoint that works.',
  scope: null,
  answers: {
    200: {
      description: 'An OpenAPI 3.1 document',
      schema: z.looseObject({ openapi: z.string() }),
      example: { openapi: '3.1.1' },
    },
  },
  problems: [],
} as const satisfies Endpoint;
