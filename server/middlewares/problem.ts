import type { ErrorRequestHandler, RequestHandler } from 'express';
import { MulterError } from 'multer';
import type { Problem, ProblemCode } from '#shared/schemas/problem.ts';
import { logger } from '../config/logger.ts';
import { DomainProblem, notFound } from '../services/problem.ts';

const titles: Record<number, string> = {
  400: 'Bad request',
  401: 'Sign in first',
  403: 'Not allowed',
  404: 'Not found',
  409: 'Changed meanwhile',
  413: 'Too large',
  415: 'Wrong type of file',
  422: 'Check the marked fields',
  429: 'Too many tries',
  500: 'Something went wrong',
  503: 'Not available',
};

function asProblem(error: unknown): { problem: Omit<Problem, 'requestId'>; log: boolean } {
  if (error instanceof DomainProblem) {
    return {
      log: false,
      problem: {
        type: 'about:blank',
        title: titles[error.status] ?? 'Refused',
        status: error.status,
        detail: error.detail,
        code: error.code,
        ...error.extra,
      },
    };
  }
  const plain = (status: number, code: ProblemCode, detail: string) => ({
    log: false,
    problem: { type: 'about:blank', title: titles[status] ?? 'Refused', status, detail, code },
  });
  if (error instanceof MulterError) {
    return error.code === 'LIMIT_FILE_SIZE'
      ? plain(413, 'too_large', 'A file may have 10 MB at most.')
      : plain(400, 'bad_request', 'The upload could not be read.');
  }
  const status = (error as { status?: unknown }).status;
  if (status === 413) return plain(413, 'too_large', 'The request is too large.');
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return plain(400, 'bad_request', 'The request could not be read.');
  }
  return {
    log: true,
    problem: {
      type: 'about:blank',
      title: 'Something went wrong',
      status: 500,
      detail:
        'Nothing was saved. Try again; if it happens again, tell your steward the number below.',
      code: 'unexpected',
    },
  };
}

/** Everything under /api that no route took. */
export const noSuchRoute: RequestHandler = () => {
  throw notFound('This address');
};

/** The only place where an error becomes a reply. */
export const problemHandler: ErrorRequestHandler = (error, req, res, next) => {
  const { problem, log } = asProblem(error);
  if (log) logger.error({ err: error as unknown, requestId: req.id }, 'request failed');
  if (res.headersSent) {
    next(error);
    return;
  }
  res.removeHeader('ETag');
  res
    .status(problem.status)
    .type('application/problem+json')
    .send(JSON.stringify({ ...problem, requestId: String(req.id) }));
};
