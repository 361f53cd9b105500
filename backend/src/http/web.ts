import { randomUUID } from 'node:crypto';
import { existsSync } from 'node:fs';
import { join } from 'node:path';
import express from 'express';
import type { ErrorRequestHandler, Express, Request, RequestHandler, Response } from 'express';
import { rateLimit } from 'express-rate-limit';
import helmet from 'helmet';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';
import { problemStatus } from '#shared/contracts/problem.ts';
import type { ProblemReply } from '#shared/contracts/problem.ts';
import type { PersonId } from '#shared/kernel/ids.ts';
import type { Instant } from '#shared/kernel/time.ts';
import { Problem } from './problem.ts';
import type { Actor, Route } from './route.ts';
import { signInOf, whoIsSignedIn } from './sign-in.ts';

/** What the front door needs from the rest. */
export interface WebParts {
  readonly routes: readonly Route[];
  readonly baseUrl: string;
  readonly trustProxy: string;
  /** The built front end; null: none is served. */
  readonly frontendFolder: string | null;
  readonly sessions: RequestHandler;
  readonly now: () => Instant;
  readonly findActor: (personId: PersonId) => Promise<Actor | null>;
  readonly log: Logger;
}

const usualBodyBytes = 200_000;
const signInsPerMinute = 60;
const assetsMaxAgeSeconds = 365 * 24 * 3600;

/** The whole web application: security headers, sign-in, routes, problems, the front end. */
export function web(parts: WebParts): Express {
  const base = new URL(parts.baseUrl);
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', parts.trustProxy);
  app.set('query parser', 'simple');
  app.use(securityHeaders(base.protocol === 'https:'));
  app.use(
    pinoHttp({
      logger: parts.log,
      genReqId: () => randomUUID(),
      // A line holds the path alone: queries carry codes and addresses.
      serializers: {
        req: (request: { method: string; url: string }) => ({
          method: request.method,
          path: request.url.split('?')[0],
        }),
        res: (response: { statusCode: number }) => ({ status: response.statusCode }),
      },
    }),
  );
  app.use('/auth', rateLimit({ windowMs: 60_000, limit: signInsPerMinute, handler: tooMany }));
  app.use(['/api', '/auth'], noStore, sameOrigin(base.origin), jsonOnly);
  app.use(['/api', '/auth'], parts.sessions);
  for (const route of parts.routes) {
    app[route.contract.method](
      route.contract.path,
      express.json({ limit: route.contract.longestBodyBytes ?? usualBodyBytes, strict: true }),
      async (request: Request, response: Response) => {
        const actor = await whoIsSignedIn(request, parts.now(), parts.findActor);
        const signIn = signInOf(request, parts.now);
        const url = new URL(request.originalUrl, base);
        await route.handle(request, response, { actor, signIn, url });
      },
    );
  }
  app.use(['/api', '/auth'], () => {
    throw new Problem('not-found', 'There is nothing at this address');
  });
  if (parts.frontendFolder !== null) serveFrontend(app, parts.frontendFolder);
  app.use(answerProblems(parts.log));
  return app;
}

function securityHeaders(isSecure: boolean): RequestHandler {
  return helmet({
    contentSecurityPolicy: {
      useDefaults: false,
      directives: {
        defaultSrc: ["'self'"],
        // The month's library writes its widths as style attributes.
        styleSrc: ["'self'", "'unsafe-inline'"],
        fontSrc: ["'self'", 'data:'],
        imgSrc: ["'self'", 'data:'],
        objectSrc: ["'none'"],
        baseUri: ["'none'"],
        formAction: ["'self'"],
        frameAncestors: ["'none'"],
        upgradeInsecureRequests: isSecure ? [] : null,
      },
    },
    strictTransportSecurity: isSecure,
    referrerPolicy: { policy: 'same-origin' },
  });
}

const noStore: RequestHandler = (_request, response, next) => {
  response.set('Cache-Control', 'no-store');
  next();
};

/** A change must come from a page of this site: its Origin says so. */
function sameOrigin(origin: string): RequestHandler {
  return (request, _response, next) => {
    if (request.method !== 'GET' && request.method !== 'HEAD' && request.get('origin') !== origin) {
      throw new Problem('wrong-origin', 'This request did not come from a page of this site');
    }
    next();
  };
}

const jsonOnly: RequestHandler = (request, _response, next) => {
  if (request.method !== 'GET' && request.method !== 'HEAD' && !request.is('application/json')) {
    throw new Problem('not-json', 'Send JSON');
  }
  next();
};

const tooMany: RequestHandler = () => {
  throw new Problem('too-many-requests', 'Too many tries. Wait a minute and try again');
};

function serveFrontend(app: Express, folder: string): void {
  const indexFile = join(folder, 'index.html');
  app.use(
    '/assets',
    express.static(join(folder, 'assets'), {
      immutable: true,
      maxAge: assetsMaxAgeSeconds * 1000,
      fallthrough: false,
    }),
  );
  app.use(express.static(folder, { index: false }));
  app.use((request, response, next) => {
    const isPage = request.method === 'GET' && request.accepts('html') !== false;
    if (isPage && existsSync(indexFile)) {
      response.set('Cache-Control', 'no-cache').sendFile(indexFile);
    } else next();
  });
}

/** Turns what was thrown into RFC 9457 problem details. A bug answers 500 with an id and no more. */
function answerProblems(log: Logger): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    if (response.headersSent) {
      next(error);
      return;
    }
    const problem = error instanceof Problem ? error : ofLibrary(error);
    if (problem.code === 'unexpected') log.error({ err: error, id: idOf(request) }, 'unexpected');
    const status = problemStatus[problem.code];
    const reply: ProblemReply = {
      type: 'about:blank',
      title: problem.message,
      status,
      code: problem.code,
      ...(problem.code === 'unexpected' ? { instance: idOf(request) } : {}),
      ...(problem.fields.length > 0 ? { fields: [...problem.fields] } : {}),
      ...(problem.reasons.length > 0 ? { reasons: [...problem.reasons] } : {}),
    };
    response.status(status).type('application/problem+json').send(JSON.stringify(reply));
  };
}

/** The id that the log line of this request carries. */
function idOf(request: Request): string {
  return typeof request.id === 'string' ? request.id : '';
}

/** Errors of the body parser and the file server carry a status; everything else is a bug. */
function ofLibrary(error: unknown): Problem {
  const status: unknown =
    typeof error === 'object' && error !== null ? Reflect.get(error, 'status') : 0;
  if (status === 404) return new Problem('not-found', 'There is nothing at this address');
  if (status === 413) return new Problem('too-large', 'This is more than can be taken at once');
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return new Problem('not-understood', 'The request could not be read');
  }
  return new Problem('unexpected', 'Something went wrong on our side');
}
