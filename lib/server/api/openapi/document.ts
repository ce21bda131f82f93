import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { ENDPOINTS } from '@/lib/contracts/api/endpoints';
import { SCOPE_NAMES, TOKEN_SCOPES } from '@/lib/token-scopes';
import { parametersOf } from './parameters';
import { HEADERS, responsesOf } from './responses';
import { type Json, SchemaBook } from './schemas';

const BEARER = 'token';

const DESCRIPTION = `Mass, CG and inertia of an aircraft program.

**Units.** SI: kg, m, kg.m2. Where an endpoint takes \`units=us\`: lb (mass), in, slug.ft2. Every answer with numbers says its units.

**Frames.** CG and places are in the airframe frame, from its datum. Inertia is about the CG in body axes: x forward, y right, z down.

**Signs.** Products of inertia are positive integrals, \`ixy\` = +∫xy dm. Off-diagonal elements of \`tensor\` are minus the products.

**Growth.** *Basic* results are without mass growth allowance, *predicted* ones with it.

**Errors** are problem details (RFC 9457) with a stable \`type\`. Unknown parameters and members are refused.

**Limits.** JSON bodies have at most 1 MiB; a token's owner may ask 600 times a minute, and roll up 60 files a minute.`;

const document = (): Json => {
  const book = new SchemaBook();
  const paths = pathsOf(ENDPOINTS, book);
  return {
    openapi: '3.1.1',
    info: { title: 'Polhode', version: '1', description: DESCRIPTION },
    jsonSchemaDialect: 'https://spec.openapis.org/oas/3.1/dialect/base',
    servers: [{ url: '/api/v1' }],
    paths,
    components: {
      schemas: book.schemas,
      headers: HEADERS,
      securitySchemes: {
        [BEARER]: {
          type: 'http',
          scheme: 'bearer',
          description: `Tokens are made on the account page, with scopes: ${scopes()}. Cookies are not looked at.`,
        },
      },
    },
  };
};

let made: Json | null = null;

/** The OpenAPI 3.1 document of every endpoint there is. */
export function openApiDocument(): Json & { readonly openapi: string } {
  made ??= document();
  return made as Json & { readonly openapi: string };
}

const scopes = (): string =>
  TOKEN_SCOPES.map((scope) => `\`${scope}\` (${SCOPE_NAMES[scope].toLowerCase()})`).join(', ');

function pathsOf(endpoints: readonly Endpoint[], book: SchemaBook): Record<string, Json> {
  const paths: Record<string, Json> = {};
  for (const endpoint of endpoints) {
    paths[endpoint.path] = { ...paths[endpoint.path], [endpoint.method]: operationOf(endpoint, book) };
  }
  return paths;
}

function operationOf(endpoint: Endpoint, book: SchemaBook): Json {
  const { operationId, summary, description, scope, body } = endpoint;
  const parameters = parametersOf(endpoint, book);
  return {
    operationId,
    summary,
    description,
    // Scopes of a bearer token may be named since OpenAPI 3.1 (4.8.30).
    security: scope === null ? [] : [{ [BEARER]: scope === 'any' ? [] : [scope] }],
    ...(parameters.length === 0 ? {} : { parameters }),
    ...(body === undefined ? {} : { requestBody: bodyOf(body, book) }),
    responses: responsesOf(endpoint, book),
  };
}

function bodyOf(body: NonNullable<Endpoint['body']>, book: SchemaBook): Json {
  const { type, description, example } = body;
  const schema =
    body.type === 'text/csv' ? { type: 'string', maxLength: body.maxBytes } : book.of(body.schema, 'input');
  return { description, required: true, content: { [type]: { schema, example } } };
}
