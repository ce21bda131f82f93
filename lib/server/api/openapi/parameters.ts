import { type Endpoint } from '@/lib/contracts/api/endpoint';
import { type Json, type SchemaBook } from './schemas';

/** Parameters of an endpoint: its path, its query and the headers it reads. Lists stand as `a,b,c`. */
export function parametersOf(endpoint: Endpoint, book: SchemaBook): Json[] {
  const places = [
    ['path', endpoint.pathParameters],
    ['query', endpoint.query],
    ['header', endpoint.headers],
  ] as const;
  return places.flatMap(([place, members]) => {
    if (members === undefined) return [];
    const { properties = {}, required = [] } = book.of(members, 'input') as {
      properties?: Record<string, Json>;
      required?: string[];
    };
    return Object.entries(properties).map(([name, { description, ...schema }]) => ({
      name,
      in: place,
      required: required.includes(name),
      ...(description === undefined ? {} : { description }),
      ...(schema['type'] === 'array' ? { style: 'form', explode: false } : {}),
      schema,
    }));
  });
}
