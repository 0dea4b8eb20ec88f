import { type Schema, schemaName } from './document.ts';

/** A piece of a type as written: words, or the name of a schema described elsewhere. */
export type TypePart = string | { schema: string };

/** A field of a body or answer. `depth` counts how deep it is nested. */
export interface SchemaRow {
  name: string;
  depth: number;
  type: TypePart[];
  limits: string;
  required: boolean;
  description: string;
}

const types = (schema: Schema): string[] => (schema.type === undefined ? [] : [schema.type].flat());
const choices = (schema: Schema): Schema[] => schema.anyOf ?? schema.oneOf ?? [];

function joined(lists: TypePart[][], between: string): TypePart[] {
  const seen = new Set<string>();
  const distinct = lists.filter((parts) => {
    const key = JSON.stringify(parts);
    return !seen.has(key) && seen.add(key);
  });
  return distinct.flatMap((parts, i) => (i === 0 ? parts : [between, ...parts]));
}

/** The type of a value in words: `string`, `list of Band`, `number or null`, `"view" or "download"`. */
export function typeParts(schema: Schema): TypePart[] {
  if (schema.$ref) return [{ schema: schemaName(schema.$ref) }];
  if (schema.contentMediaType) return ['file'];
  if (schema.const !== undefined) return [JSON.stringify(schema.const)];
  if (schema.enum)
    return joined(
      schema.enum.map((value) => [JSON.stringify(value)]),
      ' or ',
    );
  const some = choices(schema);
  if (some.length > 0) return joined(some.map(typeParts), ' or ');
  const named = types(schema).map((type): TypePart[] => {
    if (type === 'array') return arrayParts(schema);
    if (type === 'object') return objectParts(schema);
    return [schema.format && type === 'string' ? schema.format : type];
  });
  return named.length > 0 ? joined(named, ' or ') : ['any value'];
}

function arrayParts({ items, prefixItems }: Schema): TypePart[] {
  if (prefixItems)
    return [
      '[',
      ...joined(
        prefixItems.map(typeParts).map((parts) => parts),
        ', ',
      ),
      ']',
    ];
  return items ? ['list of ', ...typeParts(items)] : ['list'];
}

function objectParts({ properties, additionalProperties }: Schema): TypePart[] {
  if (properties || typeof additionalProperties !== 'object') return ['object'];
  return ['map of ', ...typeParts(additionalProperties)];
}

/** The limits of a value, such as `1 to 500`, `at most 200 characters`. Those of the number format itself are left out. */
export function limitsOf(schema: Schema): string {
  const { minimum, maximum, exclusiveMinimum, minLength, maxLength, maxItems } = schema;
  const isReal = (limit: number | undefined) => limit !== undefined && Math.abs(limit) < Number.MAX_SAFE_INTEGER;
  const texts = [
    exclusiveMinimum !== undefined && `above ${exclusiveMinimum}`,
    isReal(minimum) && `at least ${minimum}`,
    isReal(maximum) && `at most ${maximum}`,
    minLength !== undefined && minLength > 1 && `at least ${minLength} characters`,
    maxLength !== undefined && `at most ${maxLength} characters`,
    maxItems !== undefined && `at most ${maxItems} entries`,
    schema.default !== undefined && `${JSON.stringify(schema.default)} unless told`,
  ];
  return texts.filter(Boolean).join(', ');
}

/** The object whose fields are to be listed under a value: itself, the entries of a list, or one of several choices. */
function objectsIn(schema: Schema): Schema[] {
  if (schema.$ref) return [];
  if (schema.properties) return [schema];
  if (schema.items) return objectsIn(schema.items);
  if (typeof schema.additionalProperties === 'object') return objectsIn(schema.additionalProperties);
  return choices(schema).flatMap(objectsIn);
}

/** The fields of a schema, nested ones right after the field they belong to. Named schemas are not opened. */
export function schemaRows(schema: Schema, depth = 0): SchemaRow[] {
  return objectsIn(schema).flatMap(({ properties = {}, required = [] }) =>
    Object.entries(properties).flatMap(([name, field]) => [
      {
        name,
        depth,
        type: typeParts(field),
        limits: limitsOf(field),
        required: required.includes(name),
        description: field.description ?? '',
      },
      ...schemaRows(field, depth + 1),
    ]),
  );
}
