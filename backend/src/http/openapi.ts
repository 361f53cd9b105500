import { createDocument } from 'zod-openapi';
import type {
  ZodOpenApiObject,
  ZodOpenApiOperationObject,
  ZodOpenApiPathsObject,
} from 'zod-openapi';
import { problem } from '#shared/contracts/problem.ts';
import { policy } from '#shared/policy/policy.ts';
import type { Route } from './route.ts';

/** An OpenAPI 3.1 description of every route, made from its contract and its action. */
export function describeRoutes(
  groupName: string,
  routes: readonly Route[],
): { openapi: string; [member: string]: unknown } {
  const paths: ZodOpenApiPathsObject = {};
  for (const route of routes) {
    const path = route.contract.path.replaceAll(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [route.contract.method]: describe(route) };
  }
  const description: ZodOpenApiObject = {
    openapi: '3.1.0',
    info: { title: `Ebbfolk, ${groupName}`, version: '1' },
    components: {
      securitySchemes: {
        signIn: { type: 'apiKey', in: 'cookie', name: 'ebbfolk.sign-in' },
      },
    },
    paths,
  };
  return { ...createDocument(description) };
}

function describe({ contract, action }: Route): ZodOpenApiOperationObject {
  const permission = policy[action];
  return {
    summary: contract.summary,
    operationId: `${contract.method} ${contract.path}`.replaceAll(/[^a-z0-9]+/gi, '-'),
    description:
      permission.of === 'everyone'
        ? 'Open to everyone.'
        : `For people who hold one of: ${permission.roles.join(', ')}.`,
    ...(permission.of === 'everyone' ? {} : { security: [{ signIn: [] }] }),
    requestParams: {
      ...(hasMembers(contract.params) ? { path: contract.params as never } : {}),
      ...(hasMembers(contract.query) ? { query: contract.query as never } : {}),
    },
    ...(hasMembers(contract.body)
      ? { requestBody: { content: { 'application/json': { schema: contract.body } } } }
      : {}),
    responses: {
      ...(contract.answer === 'json'
        ? {
            '200': {
              description: 'Done',
              content: { 'application/json': { schema: contract.reply } },
            },
          }
        : { '303': { description: 'The browser is sent on' } }),
      default: {
        description: 'A problem, RFC 9457',
        content: { 'application/problem+json': { schema: problem } },
      },
    },
  };
}

function hasMembers(schema: unknown): boolean {
  const shape: unknown =
    typeof schema === 'object' && schema !== null ? Reflect.get(schema, 'shape') : undefined;
  return typeof shape === 'object' && shape !== null && Object.keys(shape).length > 0;
}
