/** A schema of the document (JSON Schema 2020-12), as far as it is shown. */
export interface Schema {
  $ref?: string;
  type?: string | string[];
  description?: string;
  enum?: unknown[];
  const?: unknown;
  /** A value that fits, where rules between fields keep one from being made up. */
  examples?: unknown[];
  format?: string;
  properties?: Record<string, Schema>;
  required?: string[];
  additionalProperties?: Schema | boolean;
  items?: Schema;
  prefixItems?: Schema[];
  anyOf?: Schema[];
  oneOf?: Schema[];
  allOf?: Schema[];
  default?: unknown;
  minimum?: number;
  maximum?: number;
  exclusiveMinimum?: number;
  minLength?: number;
  maxLength?: number;
  minItems?: number;
  maxItems?: number;
  contentMediaType?: string;
}

interface Parameter {
  name: string;
  in: string;
  required?: boolean;
  description?: string;
  schema: Schema;
}
interface Content {
  content?: Record<string, { schema?: Schema }>;
}
interface RawOperation {
  operationId: string;
  summary: string;
  description?: string;
  tags: string[];
  security: Record<string, unknown>[];
  parameters?: (Parameter | { $ref: string })[];
  requestBody?: Content;
  responses: Record<string, Content & { description?: string; $ref?: string }>;
}

/** The parts of an OpenAPI 3.1 document that the page shows. */
export interface OpenApi {
  paths: Record<string, Record<string, RawOperation>>;
  components: {
    schemas: Record<string, Schema>;
    parameters: Record<string, Parameter>;
    responses: Record<string, { description: string }>;
  };
}

export interface Operation {
  id: string;
  method: string;
  path: string;
  summary: string;
  /** Who may use it, in words. */
  who: string;
  parameters: Parameter[];
  body: { mediaType: string; schema: Schema } | null;
  answer: { status: string; mediaType: string | null; schema: Schema | null };
  refusals: { status: string; description: string }[];
  /** Whether an access token opens it, and whether nobody has to be signed in. */
  byToken: boolean;
  byAnyone: boolean;
}

const lastPart = (ref: string) => ref.split('/').at(-1)!;
export const schemaName = (ref: string): string => lastPart(ref);

function readOperation(document: OpenApi, path: string, method: string, raw: RawOperation): Operation {
  const { parameters, responses } = document.components;
  const [mediaType, content] = Object.entries(raw.requestBody?.content ?? {})[0] ?? [];
  const [status = '', success] = Object.entries(raw.responses).find(([code]) => code.startsWith('2')) ?? [];
  const [answerType = null, answer] = Object.entries(success?.content ?? {})[0] ?? [];
  return {
    id: raw.operationId,
    method: method.toUpperCase(),
    path,
    summary: raw.summary,
    who: raw.description ?? '',
    parameters: (raw.parameters ?? []).map((one) => ('$ref' in one ? parameters[lastPart(one.$ref)]! : one)),
    body: mediaType && content?.schema ? { mediaType, schema: content.schema } : null,
    answer: { status, mediaType: answerType, schema: answer?.schema ?? null },
    refusals: Object.entries(raw.responses)
      .filter(([code]) => code >= '400')
      .map(([code, { description, $ref }]) => ({
        status: code,
        description: description ?? ($ref ? (responses[lastPart($ref)]?.description ?? '') : ''),
      })),
    byToken: raw.security.some((means) => 'token' in means),
    byAnyone: raw.security.some((means) => Object.keys(means).length === 0),
  };
}

/** Every operation under its tag, tags and operations in the order of the document. */
export function operationsByTag(document: OpenApi): Map<string, Operation[]> {
  const byTag = new Map<string, Operation[]>();
  for (const [path, methods] of Object.entries(document.paths)) {
    for (const [method, raw] of Object.entries(methods)) {
      const tag = raw.tags[0] ?? 'Other';
      byTag.set(tag, [...(byTag.get(tag) ?? []), readOperation(document, path, method, raw)]);
    }
  }
  return byTag;
}
