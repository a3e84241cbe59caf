import { OpenAPIRegistry, OpenApiGeneratorV31 } from '@asteasolutions/zod-to-openapi';
import type { RouteConfig } from '@asteasolutions/zod-to-openapi';
import { z } from 'zod';
import * as audit from '#contracts/audit';
import * as briefs from '#contracts/briefs';
import * as catalogue from '#contracts/catalogue';
import * as designs from '#contracts/designs';
import * as desk from '#contracts/desk';
import * as errors from '#contracts/error';
import * as estimates from '#contracts/estimates';
import * as instruments from '#contracts/instruments';
import * as mail from '#contracts/mail';
import * as people from '#contracts/people';
import * as records from '#contracts/records';
import * as requirements from '#contracts/requirement';
import * as revisions from '#contracts/revisions';
import type { RouteContract } from '#contracts/route';
import { allRoutes } from '#contracts/routes';
import * as runs from '#contracts/runs';
import * as session from '#contracts/session';
import { roleWords } from '#workflows/revision';
import { canonicalJson } from './canonical-json';

const contracts = [
  errors,
  requirements,
  briefs,
  estimates,
  revisions,
  designs,
  runs,
  instruments,
  catalogue,
  records,
  desk,
  people,
  session,
  audit,
  mail,
];

/** Exported schemas of things (not of single fields) under their own names. */
const named: [string, z.ZodType][] = contracts
  .flatMap((contract) => Object.entries(contract) as [string, unknown][])
  .filter((entry): entry is [string, z.ZodType] => entry[1] instanceof z.ZodObject || entry[1] instanceof z.ZodUnion);

const whoMay = ({ allowed }: RouteContract): string => {
  if (allowed === 'anyone') return 'Anybody may call this.';
  if (allowed === 'signedIn') return 'Anybody who is signed in may call this.';
  return `For the role ${allowed.map((role) => roleWords[role]).join(' or ')}.`;
};

const json = (schema: z.ZodType) => ({ 'application/json': { schema } });

const refusals: Record<number, string> = {
  401: 'Nobody is signed in',
  403: 'Not with this role, or without a valid token',
  404: 'There is no such thing, or it is not for these eyes',
  409: 'It changed meanwhile, or its state does not admit this',
  422: 'Something sent cannot be taken; each issue names path, value and limit',
  429: 'Too many attempts',
  500: 'A bug',
  503: 'Not to be had just now',
};

/** Refusals that a route can answer with, from what its contract says. */
function refusalsOf({ allowed, method, params, query, body }: RouteContract): number[] {
  const changes = method !== 'get';
  return [
    ...(allowed === 'anyone' && !changes ? [] : [401, 403]),
    ...(params === undefined ? [] : [404]),
    ...(changes ? [409, 429] : []),
    ...(params === undefined && query === undefined && body === undefined ? [] : [422]),
    500,
    503,
  ];
}

function pathOf(name: string, contract: RouteContract): RouteConfig {
  const { method, path, summary, allowed, params, query, body, status = 200, answer } = contract;
  const changes = method !== 'get';
  return {
    method,
    path: `/api${path.replace(/:(\w+)/g, '{$1}')}`,
    operationId: name,
    summary,
    description: whoMay(contract),
    security: allowed === 'anyone' ? [] : [{ session: [] }],
    request: {
      params,
      query,
      ...(changes && { headers: z.object({ 'x-csrf-token': z.string() }) }),
      ...(body && { body: { required: true, content: json(body) } }),
    },
    responses: {
      [status]: { description: 'Done', ...(answer && { content: json(answer) }) },
      ...Object.fromEntries(
        refusalsOf(contract).map((code) => [
          code,
          { description: refusals[code] ?? 'Refused', content: json(errors.ErrorAnswer) },
        ]),
      ),
    },
  };
}

const isObject = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null;

/** The canonical text of a subtree; each is written out once. */
function textOf(texts: WeakMap<object, string>, value: unknown): string {
  if (!isObject(value)) return canonicalJson(value);
  let text = texts.get(value);
  if (text === undefined) {
    text = Array.isArray(value)
      ? `[${value.map((item) => textOf(texts, item)).join(',')}]`
      : `{${Object.keys(value)
          .sort()
          .map((key) => `${key}:${textOf(texts, value[key])}`)
          .join(',')}}`;
    texts.set(value, text);
  }
  return text;
}

/** Puts a reference wherever a subtree says exactly what a named schema says. */
function withReferences(value: unknown, nameOf: (value: object) => string | undefined, self?: string): unknown {
  if (Array.isArray(value)) return value.map((item) => withReferences(item, nameOf));
  if (!isObject(value)) return value;
  const name = nameOf(value);
  if (name !== undefined && name !== self) return { $ref: `#/components/schemas/${name}` };
  return Object.fromEntries(Object.entries(value).map(([key, member]) => [key, withReferences(member, nameOf)]));
}

function generate(version: string): { openapi: string; [part: string]: unknown } {
  const info = { title: 'Tremolode', version };
  const registry = new OpenAPIRegistry();
  for (const [name, contract] of Object.entries(allRoutes)) registry.registerPath(pathOf(name, contract));
  for (const [name, schema] of named) {
    registry.registerPath({
      method: 'get',
      path: `#${name}`,
      responses: { 200: { description: '', content: json(schema) } },
    });
  }
  const document = new OpenApiGeneratorV31(registry.definitions).generateDocument({ openapi: '3.1.0', info });
  const everything = Object.entries(document.paths ?? {});
  const schemas = everything
    .filter(([path]) => path.startsWith('#'))
    .map(([path, item]): [string, unknown] => [
      path.slice(1),
      item.get?.responses?.['200']?.content?.['application/json']?.schema,
    ]);

  const texts = new WeakMap<object, string>();
  const names = new Map<string, string>();
  for (const [name, schema] of schemas) {
    const text = textOf(texts, schema);
    if (!names.has(text)) names.set(text, name);
  }
  const nameOf = (value: object) => names.get(textOf(texts, value));
  return {
    openapi: '3.1.0',
    info: {
      ...info,
      description:
        'From vibration brief to released generator. Figures are SI. Changes need the header x-csrf-token with the token ' +
        'that GET /api/session gives, and, where a thing has a version, the version that was read.',
    },
    paths: withReferences(Object.fromEntries(everything.filter(([path]) => !path.startsWith('#'))), nameOf),
    components: {
      schemas: Object.fromEntries(
        schemas
          .filter(([name, schema]) => names.get(textOf(texts, schema)) === name)
          .map(([name, schema]) => [name, withReferences(schema, nameOf, name)]),
      ),
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'tremolode-session' } },
    },
  };
}

let made: { version: string; document: ReturnType<typeof generate> } | null = null;

/** The interface as OpenAPI 3.1, from the same contracts that the server parses by; made once. */
export function openApi(version: string): ReturnType<typeof generate> {
  if (made?.version !== version) made = { version, document: generate(version) };
  return made.document;
}
