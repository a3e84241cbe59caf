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

/** Gives equal subtrees equal numbers, each from the numbers of its members: no subtree is written out twice. */
function numbering(): (value: unknown) => number {
  const numbers = new Map<string, number>();
  const known = new WeakMap<object, number>();
  const numberOf = (value: unknown): number => {
    if (!isObject(value)) return numbered(JSON.stringify(value) ?? 'absent');
    let found = known.get(value);
    if (found === undefined) {
      found = Array.isArray(value)
        ? numbered(`[${value.map(numberOf).join()}]`)
        : numbered(
            `{${Object.keys(value)
              .sort()
              .map((key) => `${key}:${numberOf(value[key])}`)
              .join()}}`,
          );
      known.set(value, found);
    }
    return found;
  };
  const numbered = (form: string): number => {
    const found = numbers.get(form) ?? numbers.size;
    numbers.set(form, found);
    return found;
  };
  return numberOf;
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

  const numberOf = numbering();
  const names = new Map<number, string>();
  for (const [name, schema] of schemas) {
    const number = numberOf(schema);
    if (!names.has(number)) names.set(number, name);
  }
  const nameOf = (value: object) => names.get(numberOf(value));
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
          .filter(([name, schema]) => names.get(numberOf(schema)) === name)
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
