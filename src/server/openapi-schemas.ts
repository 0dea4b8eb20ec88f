import * as z from 'zod';

export type Json = Record<string, unknown>;

/**
 * JSON Schemas (2020-12, the dialect of OpenAPI 3.1) of contracts. Parts that have an id are gathered as components.
 * What leaves must be asked for before what enters: a part that does both may read otherwise on its way in (defaults
 * need not be sent, unknown fields are refused), and is then named with "Input" at its end.
 */
export class SchemaCollector {
  readonly components: Record<string, Json> = {};
  readonly #leaving = new Set<string>();

  /** Of what leaves the program. */
  output(schema: z.ZodType): Json {
    return this.#collect(schema, 'output', (id) => {
      this.#leaving.add(id);
      return id;
    });
  }

  /** Of what enters it. */
  input(schema: z.ZodType): Json {
    return this.#collect(schema, 'input', (id) => (this.#leaving.has(id) && !id.endsWith('Input') ? `${id}Input` : id));
  }

  #collect(schema: z.ZodType, io: 'input' | 'output', nameOf: (id: string) => string): Json {
    // A part that JSON Schema cannot tell (a check in code) is told by its description alone.
    const { $schema: _, $defs = {}, ...root } = z.toJSONSchema(schema, { io, unrepresentable: 'any' }) as Json;
    for (const [id, part] of Object.entries($defs as Record<string, Json>))
      this.components[nameOf(id)] = renamed(withExamples(part), nameOf) as Json;
    return renamed(withExamples(root), nameOf) as Json;
  }
}

/** `example` of a contract's meta, in the form of JSON Schema; zod drops `examples` wherever something is transformed. */
const withExamples = ({ example, ...part }: Json): Json =>
  example === undefined ? part : { ...part, examples: [example] };

/** References moved from the schema's own definitions to the components of the document. */
function renamed(value: unknown, nameOf: (id: string) => string): unknown {
  if (Array.isArray(value)) return value.map((item) => renamed(item, nameOf));
  if (typeof value !== 'object' || value === null) return value;
  const entries = Object.entries(value).map(([key, inner]) => {
    const id = key === '$ref' ? /^#\/\$defs\/(.+)$/.exec(String(inner))?.[1] : undefined;
    return [key, id === undefined ? renamed(inner, nameOf) : `#/components/schemas/${nameOf(id)}`];
  });
  return Object.fromEntries(entries);
}
