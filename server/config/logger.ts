import { pino } from 'pino';
import { env } from './runtime.ts';

/** Structured log on standard output; secrets and bodies are never written. */
export const logger = pino({
  level: env.logLevel,
  base: undefined,
  redact: {
    paths: [
      'req.headers.cookie',
      'req.headers.authorization',
      '*.password',
      '*.token',
      '*.passwordHash',
    ],
    remove: true,
  },
});
