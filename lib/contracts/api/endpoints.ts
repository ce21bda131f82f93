import { angularMomentumEndpoint } from '@/lib/contracts/api/angular-momentum';
import { baselineConditionEndpoint } from '@/lib/contracts/api/baseline-condition';
import { baselineCsvEndpoint } from '@/lib/contracts/api/baseline-csv';
import { baselineEndpoint } from '@/lib/contracts/api/baseline-document';
import { baselineListEndpoint } from '@/lib/contracts/api/baseline-list';
import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { healthEndpoint } from '@/lib/contracts/api/health';
import { importEndpoint } from '@/lib/contracts/api/imports';
import { saveListEndpoint } from '@/lib/contracts/api/lists';
import { openapiEndpoint } from '@/lib/contracts/api/openapi';
import { programsEndpoint } from '@/lib/contracts/api/programs';
import { addRevisionEndpoint } from '@/lib/contracts/api/revisions';
import { rollUpEndpoint } from '@/lib/contracts/api/roll-ups';

/** Every endpoint of the JSON API, in the order of the documentation. */
export const ENDPOINTS: readonly Endpoint[] = [
  rollUpEndpoint,
  programsEndpoint,
  baselineListEndpoint,
  baselineEndpoint,
  baselineConditionEndpoint,
  baselineCsvEndpoint,
  angularMomentumEndpoint,
  saveListEndpoint,
  addRevisionEndpoint,
  importEndpoint,
  openapiEndpoint,
  healthEndpoint,
];
