import { allRoutes } from '#contracts/routes';
import type { RouteContract } from '#contracts/route';
import type { ErrorAnswer } from '#contracts/error';

type Name = keyof typeof allRoutes;
export interface Asked {
  name: Name;
  params: Record<string, string>;
  body: unknown;
}
type Reply = { status?: number; body?: unknown } | ErrorAnswer['error'];
type Answering = (asked: Asked) => Reply;

const statusOf: Record<ErrorAnswer['error']['code'], number> = {
  invalid: 422,
  unauthenticated: 401,
  forbidden: 403,
  csrf: 403,
  notFound: 404,
  conflict: 409,
  tooMany: 429,
  unavailable: 503,
  bug: 500,
};

function match(route: RouteContract, method: string, path: string): Record<string, string> | null {
  if (route.method !== method) return null;
  const wanted = route.path.split('/');
  const given = path.split('/');
  if (wanted.length !== given.length) return null;
  const params: Record<string, string> = {};
  for (const [index, part] of wanted.entries()) {
    if (part.startsWith(':')) params[part.slice(1)] = given[index] ?? '';
    else if (part !== given[index]) return null;
  }
  return params;
}

const isError = (reply: Reply): reply is ErrorAnswer['error'] => 'code' in reply;

/**
 * Stands in for the server behind `fetch`: finds the route by the real table, refuses bodies that its contract would refuse,
 * and answers what the test says. A request without an answer fails the test that made it.
 */
export function clientApi(answers: Partial<Record<Name, Answering>>) {
  const asked: Asked[] = [];
  const fetch = (input: RequestInfo | URL, init: RequestInit = {}): Promise<Response> => {
    const url = new URL(String(input), 'http://localhost');
    const method = (init.method ?? 'GET').toLowerCase();
    const path = url.pathname.replace(/^\/api/, '');
    for (const [name, route] of Object.entries(allRoutes) as [Name, RouteContract][]) {
      const params = match(route, method, path);
      if (params === null) continue;
      const body: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : undefined;
      asked.push({ name, params, body });
      if (name === 'readSession' && answers.readSession === undefined)
        return Promise.resolve(json(200, { me: null, csrfToken: 'token' }));
      const answering = answers[name];
      if (answering === undefined) throw new Error(`No answer for ${name}.`);
      if (route.body) {
        const parsed = route.body.safeParse(body);
        if (!parsed.success) throw new Error(`${name} was sent what its contract refuses: ${parsed.error.message}`);
      }
      const reply = answering({ name, params, body });
      if (isError(reply)) return Promise.resolve(json(statusOf[reply.code], { error: reply }));
      return Promise.resolve(json(reply.status ?? route.status ?? 200, reply.body));
    }
    throw new Error(`No route for ${method} ${path}.`);
  };
  return { fetch, asked, bodies: (name: Name) => asked.filter((each) => each.name === name).map(({ body }) => body) };
}

const json = (status: number, body: unknown) =>
  new Response(body === undefined ? null : JSON.stringify(body), {
    status,
    headers: { 'content-type': 'application/json' },
  });
