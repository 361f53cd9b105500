import { QueryClientProvider } from '@tanstack/react-query';
import { render } from '@testing-library/react';
import { createMemoryRouter, RouterProvider } from 'react-router-dom';
import { vi } from 'vitest';
import { makeQueryClient } from '#frontend/api/query-client.ts';
import { routes, signInPage } from '#frontend/router.tsx';
import type { EndpointName } from '#shared/contracts/endpoints.ts';
import { endpoints } from '#shared/contracts/endpoints.ts';
import { problem, problemStatus } from '#shared/contracts/problem.ts';
import type { ProblemCode, ProblemReply } from '#shared/contracts/problem.ts';

/** What the stubbed server was asked. */
export interface Asked {
  readonly endpoint: EndpointName;
  readonly url: URL;
  /** What was sent as JSON; undefined where nothing was. */
  readonly body: unknown;
}

export type Answers = Partial<Record<EndpointName, (asked: Asked) => unknown>>;

/** Thrown by an answer: the server refuses with this problem. */
export class Refuses extends Error {
  readonly problem: ProblemReply;

  constructor(
    code: ProblemCode,
    title: string,
    reasons?: ProblemReply['reasons'],
    fields?: ProblemReply['fields'],
  ) {
    super(title);
    this.problem = problem.parse({
      type: `about:blank#${code}`,
      title,
      status: problemStatus[code],
      code,
      ...(reasons === undefined ? {} : { reasons }),
      ...(fields === undefined ? {} : { fields }),
    });
  }
}

/** Opens a page of the application at an address, its server answering as told. */
export function openPage(address: string, answers: Answers) {
  const asked: Asked[] = [];
  vi.stubGlobal('fetch', async (input: string, init: RequestInit = {}) => {
    const request = askedOf(input, init);
    asked.push(request);
    const answer = answers[request.endpoint];
    if (answer === undefined) throw new TypeError(`No answer to ${request.endpoint}`);
    try {
      return respond(200, 'application/json', await answer(request));
    } catch (error) {
      if (!(error instanceof Refuses)) throw error;
      return respond(error.problem.status, 'application/problem+json', error.problem);
    }
  });
  const queryClient = makeQueryClient(() => {
    const { pathname, search } = router.state.location;
    void router.navigate(signInPage(pathname + search), { replace: true });
  });
  queryClient.setDefaultOptions({ queries: { retry: false, staleTime: 30_000 } });
  const router = createMemoryRouter(routes(queryClient), { initialEntries: [address] });
  render(
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={router} />
    </QueryClientProvider>,
  );
  return { asked, router };
}

function askedOf(input: string, init: RequestInit): Asked {
  const url = new URL(input, 'http://skerrow.test');
  const method = (init.method ?? 'GET').toLowerCase();
  const found = (Object.keys(endpoints) as EndpointName[]).find((name) => {
    const pattern = new RegExp(`^${endpoints[name].path.replace(/:\w+/g, '[^/]+')}$`);
    return endpoints[name].method === method && pattern.test(url.pathname);
  });
  if (found === undefined) throw new TypeError(`No endpoint ${method} ${url.pathname}`);
  const body: unknown = typeof init.body === 'string' ? JSON.parse(init.body) : undefined;
  return { endpoint: found, url, body };
}

function respond(status: number, type: string, body: unknown): Response {
  return new Response(JSON.stringify(body), { status, headers: { 'content-type': type } });
}
