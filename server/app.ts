import { randomUUID } from 'node:crypto';
import path from 'node:path';
import compression from 'compression';
import express, { type Express } from 'express';
import helmet from 'helmet';
import { pinoHttp } from 'pino-http';
import { logger } from './config/logger.ts';
import { passport } from './config/passport.ts';
import { env } from './config/runtime.ts';
import { problemHandler } from './middlewares/problem.ts';
import { sameOrigin } from './middlewares/sameOrigin.ts';
import { renewSession, sessions } from './middlewares/session.ts';
import { operationsRouter } from './routes/operations.ts';
import { allRoutes, apiRouter } from './routes/index.ts';
import { openApiRouter } from './routes/openapi.ts';

const clientFolder = path.join(import.meta.dirname, '..', 'dist', 'spa');

/** The Express app, complete but not listening. */
export function createApp(): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', env.behindTls ? 1 : false);
  app.use(
    pinoHttp({
      logger,
      genReqId: (_req, res) => {
        const id = randomUUID();
        res.setHeader('X-Request-Id', id);
        return id;
      },
      autoLogging: { ignore: (req) => !(req.url ?? '').startsWith('/api/') },
      serializers: {
        req: (req: { id: string; method: string; url: string }) => ({
          id: req.id,
          method: req.method,
          // A link's token is a secret.
          url: req.url.replace(/[?].*$/, '').replace(/[\w-]{40,}/g, '…'),
        }),
        res: (res: { statusCode: number }) => ({ status: res.statusCode }),
      },
      customLogLevel: (_req, res, error) => ((error ?? res.statusCode >= 500) ? 'error' : 'info'),
    }),
  );
  app.use(
    helmet({
      contentSecurityPolicy: {
        useDefaults: false,
        directives: {
          defaultSrc: ["'none'"],
          scriptSrc: ["'self'"],
          styleSrc: ["'self'"],
          styleSrcAttr: ["'none'"],
          fontSrc: ["'self'"],
          imgSrc: ["'self'", 'data:', 'blob:'],
          connectSrc: ["'self'"],
          frameSrc: ["'self'"],
          workerSrc: ["'self'"],
          manifestSrc: ["'self'"],
          formAction: ["'self'"],
          baseUri: ["'none'"],
          frameAncestors: ["'none'"],
        },
      },
      strictTransportSecurity: env.behindTls,
      referrerPolicy: { policy: 'same-origin' },
    }),
  );
  app.use(operationsRouter());
  app.use(compression());
  app.use(openApiRouter(allRoutes));
  app.use(
    '/api/v1',
    sessions,
    passport.initialize(),
    passport.session(),
    renewSession,
    sameOrigin,
    express.json({ limit: '1mb' }),
    express.urlencoded({ extended: false, limit: '10kb' }),
    apiRouter(),
  );
  app.use(
    express.static(clientFolder, {
      index: false,
      setHeaders: (res, file) => {
        const hashed = file.includes(`${path.sep}assets${path.sep}`);
        res.setHeader('Cache-Control', hashed ? 'public, max-age=31536000, immutable' : 'no-cache');
      },
    }),
  );
  app.get('/{*page}', (_req, res) => {
    res.setHeader('Cache-Control', 'no-cache');
    res.sendFile(path.join(clientFolder, 'index.html'));
  });
  app.use(problemHandler);
  return app;
}
