import * as z from 'zod';
import { OPERATIONS, type Operation } from '../contract/operations.ts';
import { problem } from '../contract/problem.ts';
import { VERSION } from '../contract/version.ts';

/** The OpenAPI 3.1 description of the server, made from its contract. */
export function openApi(): object {
  const schemas: Record<string, object> = {};
  const paths: Record<string, Record<string, object>> = {};
  for (const [operationId, operation] of Object.entries(OPERATIONS) as [string, Operation][]) {
    paths[operation.path] = {
      ...paths[operation.path],
      [operation.method]: hoisted(describe(operationId, operation), schemas),
    };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Dwellbook',
      version: VERSION,
      description:
        "A workshop's cure-run log. It reads and compares; it controls no vessel and says nothing about whether one is safe to open.",
    },
    jsonSchemaDialect: 'https://json-schema.org/draft/2020-12/schema',
    paths,
    components: { schemas },
  };
}

/** Named schemas stand once, under components; a reference is to the whole description, not to one schema. */
function hoisted(value: unknown, schemas: Record<string, object>): object {
  const walk = (inner: unknown): unknown => {
    if (Array.isArray(inner)) return inner.map(walk);
    if (typeof inner !== 'object' || inner === null) return inner;
    const { $defs, ...rest } = inner as { $defs?: Record<string, object> };
    for (const [name, schema] of Object.entries($defs ?? {})) schemas[name] = walk(schema) as object;
    return Object.fromEntries(
      Object.entries(rest).map(([key, member]) => [
        key,
        key === '$ref' ? String(member).replace('#/$defs/', '#/components/schemas/') : walk(member),
      ]),
    );
  };
  return walk(value) as object;
}

function describe(operationId: string, operation: Operation): object {
  const { summary, roles, path, query, sends, body, answer, status = 200 } = operation;
  return {
    operationId,
    summary,
    'x-roles': roles,
    parameters: [...pathParameters(path), ...(query === undefined ? [] : queryParameters(query))],
    ...(sends === 'nothing' ? {} : { requestBody: { required: true, content: bodyContent(sends, body) } }),
    responses: {
      [status]: { description: summary, content: answerContent(answer) },
      default: {
        description: 'A problem',
        content: { 'application/problem+json': { schema: schemaOf(problem, 'output') } },
      },
    },
  };
}

function pathParameters(path: string): object[] {
  return [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => ({
    name,
    in: 'path',
    required: true,
    schema: { type: 'string' },
  }));
}

function queryParameters(query: z.ZodType): object[] {
  const { properties = {}, required = [] } = schemaOf(query, 'input');
  return Object.entries(properties).map(([name, schema]) => ({
    name,
    in: 'query',
    required: required.includes(name),
    schema,
  }));
}

function bodyContent(sends: Operation['sends'], body: z.ZodType | undefined): object {
  return body === undefined
    ? { [sends === 'csv' ? 'text/csv' : 'application/octet-stream']: { schema: { type: 'string', format: 'binary' } } }
    : { 'application/json': { schema: schemaOf(body, 'input') } };
}

function answerContent(answer: Operation['answer']): object {
  return typeof answer === 'string' ? { [answer]: {} } : { 'application/json': { schema: schemaOf(answer, 'output') } };
}

interface JsonSchema {
  readonly properties?: Readonly<Record<string, object>>;
  readonly required?: readonly string[];
}

/** Documents are described by their own formats; to HTTP they are objects with a `format`. */
function schemaOf(schema: z.ZodType, io: 'input' | 'output'): JsonSchema {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, {
    io,
    unrepresentable: 'any',
    reused: 'inline',
    override: ({ zodSchema, jsonSchema }) => {
      if (zodSchema._zod.def.type === 'custom') jsonSchema.type = 'object';
    },
  });
  return rest as JsonSchema;
}
