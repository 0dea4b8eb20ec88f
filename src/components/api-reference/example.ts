import { type OpenApi, type Operation, type Schema, schemaName } from './document.ts';

/** Invented values that read better than "text", by the name of the field. */
const INVENTED: Record<string, unknown> = {
  accession: 'ZF000042-X',
  complex: 'ZF000042-X',
  formula: '[Cr(ox)3]3-',
  geometry: 'OC-6',
  solvent: 'water',
  email: 'partner@example.org',
  name: 'Oxalate series',
  x: [15_000, 20_000, 25_000],
  epsilon: [12, 74, 31],
  label: 'Batch 7',
  title: 'Batch 7 in water',
  password: 'four words of your own',
};

/** Schemas that are a value of their own, by name. */
const INVENTED_SCHEMAS: Record<string, unknown> = { Accession: 'ZF000042-X' };
const DEEPEST = 6;

/** A value that fits a schema: what must be there and nothing else. */
export function exampleOf(document: OpenApi, schema: Schema, field = '', depth = 0): unknown {
  if (schema.$ref) {
    const name = schemaName(schema.$ref);
    if (name in INVENTED_SCHEMAS) return INVENTED_SCHEMAS[name];
    const target = document.components.schemas[name];
    return target && depth < DEEPEST ? exampleOf(document, target, field, depth + 1) : {};
  }
  if (schema.examples?.length) return schema.examples[0];
  if (schema.const !== undefined) return schema.const;
  if (Array.isArray(INVENTED[field]) && schema.type === 'array') return INVENTED[field];
  if (schema.enum) return schema.enum[0];
  const choice = (schema.anyOf ?? schema.oneOf)?.find(({ type }) => type !== 'null');
  if (choice) return exampleOf(document, choice, field, depth + 1);
  switch ([schema.type].flat().find((type) => type !== 'null')) {
    case 'object':
      return objectExample(document, schema, depth);
    case 'array':
      return arrayExample(document, schema, field, depth);
    case 'string':
      return stringExample(schema, field);
    case 'boolean':
      return true;
    case 'number':
    case 'integer':
      return Math.max(1, Math.abs(schema.minimum ?? 0) < Number.MAX_SAFE_INTEGER ? (schema.minimum ?? 1) : 1);
    default:
      return {};
  }
}

function arrayExample(document: OpenApi, { items, minItems = 0 }: Schema, field: string, depth: number): unknown[] {
  return items ? Array.from({ length: minItems }, () => exampleOf(document, items, field, depth + 1)) : [];
}

function objectExample(document: OpenApi, { properties = {}, required = [] }: Schema, depth: number) {
  const names = required.length > 0 ? required : Object.keys(properties).slice(0, 1);
  return Object.fromEntries(
    names.flatMap((name) => {
      const field = properties[name];
      return field ? [[name, exampleOf(document, field, name, depth + 1)]] : [];
    }),
  );
}

function stringExample({ format }: Schema, field: string): unknown {
  if (field in INVENTED) return INVENTED[field];
  if (format === 'date-time') return '2027-06-30T12:00:00Z';
  if (format === 'date') return '2027-06-30';
  if (format === 'email') return INVENTED.email;
  return field === 'lab' || field === 'id' || field === 'folio' ? `${field.toUpperCase()}_ID` : 'text';
}

/** Quoted for a POSIX shell. */
const quoted = (text: string) => `'${text.replaceAll("'", "'\\''")}'`;

/**
 * The operation as a line for a shell with curl, the token taken from `$TOKEN`; null for what no token opens.
 *
 * @param origin - scheme, host and port of this registry
 */
export function curlOf(document: OpenApi, operation: Operation, origin: string): string | null {
  const { method, path, body, answer, byToken, byAnyone, parameters } = operation;
  if (!byToken && !byAnyone) return null;
  const url =
    origin +
    path.replace(/\{(\w+)\}/g, (_, name: string) => (name === 'accession' ? 'ZF000042-X' : name.toUpperCase()));
  const isFile = answer.mediaType !== null && !/json$/.test(answer.mediaType);
  const parts = [
    method === 'GET' ? 'curl' : `curl -X ${method}`,
    ...(isFile ? ['-OJ'] : []),
    ...(byAnyone ? [] : ['-H "Authorization: Bearer $TOKEN"']),
    ...(parameters.some(({ name }) => name === 'If-Match') ? [`-H ${quoted('If-Match: "ETAG"')}`] : []),
    ...bodyParts(document, body),
    quoted(url),
  ];
  return parts.join(' \\\n  ');
}

function bodyParts(document: OpenApi, body: Operation['body']): string[] {
  if (!body) return [];
  if (body.mediaType === 'application/json') {
    const json = JSON.stringify(exampleOf(document, body.schema));
    return [`-H ${quoted('Content-Type: application/json')}`, `-d ${quoted(json)}`];
  }
  return Object.entries(body.schema.properties ?? {}).map(([name, part]) => {
    if (part.contentMediaType) return `-F ${quoted(`${name}=@scan.csv`)}`;
    return `-F ${quoted(`${name}=${JSON.stringify(exampleOf(document, part, name))};type=application/json`)}`;
  });
}
