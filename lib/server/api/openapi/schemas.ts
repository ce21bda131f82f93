import { z } from 'zod';

export type Json = Record<string, unknown>;

const DEFS = '#/$defs/';
export const SCHEMAS = '#/components/schemas/';

/**
 * Turns zod schemas into JSON Schema for one document. Schemas with an `id` in their meta are collected once under
 * `components.schemas` and referred to.
 */
export class SchemaBook {
  readonly schemas: Json = {};

  /** The schema of what is sent to us (`input`: defaults may be left out) or by us (`output`). */
  of(schema: z.ZodType, io: 'input' | 'output'): Json {
    const { $defs = {}, ...made } = z.toJSONSchema(schema, {
      target: 'draft-2020-12',
      io,
      override: ({ zodSchema, jsonSchema }) => {
        const { def } = zodSchema._zod;
        // What a default is also matters where the text of a query becomes a value on the way.
        if (io === 'input' && def.type === 'default') jsonSchema.default = def.defaultValue;
        // Answers grow by members; a client must not refuse one that has more.
        if (io === 'output' && jsonSchema.additionalProperties === false)
          delete jsonSchema.additionalProperties;
      },
    });
    for (const [id, shared] of Object.entries($defs)) this.schemas[id] = referring(shared);
    delete made.$schema;
    return referring(made) as Json;
  }
}

/** The same with references into the document instead of the schema. */
function referring(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(referring);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value).map(([name, member]) => [
      name,
      name === '$ref' && typeof member === 'string' ? member.replace(DEFS, SCHEMAS) : referring(member),
    ]),
  );
}
