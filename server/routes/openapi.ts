import path from 'node:path';
import { createRequire } from 'node:module';
import {
  OpenAPIRegistry,
  OpenApiGeneratorV31,
  type RouteConfig,
} from '@asteasolutions/zod-to-openapi';
import express, { Router } from 'express';
import { z } from 'zod';
import { Problem } from '#shared/schemas/problem.ts';
import type { RouteDef } from '../middlewares/route.ts';

const require = createRequire(import.meta.url);

const refusals: Record<RouteDef['level'], readonly number[]> = {
  visitor: [422],
  account: [401, 422],
  club: [401, 403, 404, 409, 422],
  buy: [401, 403, 404, 409, 422],
};

/** OpenAPI 3.1 document of the routes, from the very schemas that check requests and replies. */
export function openApiDocument(routes: readonly RouteDef[]) {
  const registry = new OpenAPIRegistry();
  const session = registry.registerComponent('securitySchemes', 'session', {
    type: 'apiKey',
    in: 'cookie',
    name: 'tarewell.sid',
  });
  const problem = Problem.meta({ id: 'Problem' });
  for (const route of routes) {
    const names = [...route.path.matchAll(/:(\w+)/g)].map(([, name]) => name ?? '');
    const params = z.object(Object.fromEntries(names.map((name) => [name, z.string()])));
    const request: NonNullable<RouteConfig['request']> = { params };
    if (route.query instanceof z.ZodObject) request.query = route.query;
    if (route.takesFile) {
      const file = z.object({ file: z.string().meta({ format: 'binary' }) });
      const schema = route.body instanceof z.ZodObject ? file.extend(route.body.shape) : file;
      request.body = { content: { 'multipart/form-data': { schema } } };
    } else if (route.body) {
      request.body = { content: { 'application/json': { schema: route.body } }, required: true };
    }
    registry.registerPath({
      method: route.method,
      path: `/api/v1${route.path.replace(/:(\w+)/g, '{$1}')}`,
      summary: route.summary,
      tags: [
        route.path.split('/').find((part) => part && !part.startsWith(':') && part !== 'clubs') ??
          'clubs',
      ],
      ...(route.level === 'visitor' ? {} : { security: [{ [session.name]: [] }] }),
      request,
      responses: {
        [route.status]: {
          description: 'Done',
          ...(route.reply === 'file'
            ? {}
            : { content: { 'application/json': { schema: route.reply } } }),
        },
        ...Object.fromEntries(
          refusals[route.level].map((status) => [
            status,
            {
              description: 'Refused',
              content: { 'application/problem+json': { schema: problem } },
            },
          ]),
        ),
      },
    });
  }
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: {
      title: 'Tarewell',
      version: '1',
      description:
        'Money is in minor units of the club’s currency, mass in milligrams, instants in UTC. Refusals are RFC 9457 problem documents.',
    },
  });
}

const page = `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><title>Tarewell API</title>
<meta name="viewport" content="width=device-width, initial-scale=1">
<link rel="stylesheet" href="docs/swagger-ui.css"></head>
<body><div id="api"></div><script src="docs/swagger-ui-bundle.js"></script><script src="docs/start.js"></script></body></html>`;

const starter = `SwaggerUIBundle({ url: '/api/v1/openapi.json', dom_id: '#api', validatorUrl: null, deepLinking: true });`;

/** The document and a page to read it, both without sign-in and without anything from elsewhere. */
export function openApiRouter(routes: readonly RouteDef[]): Router {
  const router = Router();
  let document: string | undefined;
  router.get('/api/v1/openapi.json', (_req, res) => {
    document ??= JSON.stringify(openApiDocument(routes));
    res.type('application/json').send(document);
  });
  router.get('/api/docs', (_req, res) => {
    res.type('html').send(page);
  });
  router.get('/api/docs/start.js', (_req, res) => {
    res.type('text/javascript').send(starter);
  });
  router.use(
    '/api/docs',
    express.static(path.dirname(require.resolve('swagger-ui-dist/package.json')), { index: false }),
  );
  return router;
}
