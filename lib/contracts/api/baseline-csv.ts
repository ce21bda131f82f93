import { z } from 'zod';
import { baselineQuery } from '@/lib/contracts/api/baseline-document';
import { baselinePath, ETAG, ifNoneMatch, NOT_MODIFIED } from '@/lib/contracts/api/baseline-parameters';
import { type Endpoint } from '@/lib/contracts/api/endpoint';

export const baselineCsvEndpoint = {
  method: 'get',
  path: '/programs/{program}/baselines/{number}.csv',
  operationId: 'getBaselineCsv',
  summary: 'Get the conditions of a signed baseline as CSV',
  description:
    'RFC 4180 with one header row, then one row per condition with the numbers of the hand-off document in full. Column names end in their ' +
    'unit (`ixy_kg_m2`); `products`, `cg_axes` and `inertia_axes` state the conventions; `predicted_` columns include mass growth allowance; ' +
    '`sigma_` columns are one standard deviation. Text that a spreadsheet would run as a formula has an apostrophe before it.',
  scope: 'baselines:read',
  pathParameters: baselinePath,
  query: baselineQuery,
  headers: ifNoneMatch,
  answers: {
    200: {
      description: 'One row per condition',
      type: 'text/csv',
      schema: z.string(),
      example:
        'condition,title,products,cg_axes,inertia_axes,mass_kg,cg_x_m,cg_y_m,cg_z_m,ixx_kg_m2\r\n' +
        'take-off,Take-off,positive integral,"airframe, from the datum; x aft, y right, z up",' +
        '"body, origin at the CG; x forward, y right, z down",7271.52287601464,8.287596876447545,0.04014847487070508,' +
        '2.386282251669189,35187.56409482495\r\n',
      headers: ETAG,
    },
  },
  bare: NOT_MODIFIED,
  problems: ['not-found', 'forbidden', 'gone', 'invalid-input'],
} as const satisfies Endpoint;
