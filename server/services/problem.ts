import type { ProblemCode } from '#shared/schemas/problem.ts';

/** A refusal that the caller is told: becomes an RFC 9457 document in one middleware. */
export class DomainProblem extends Error {
  constructor(
    readonly status: 400 | 401 | 403 | 404 | 409 | 413 | 415 | 422 | 429 | 503,
    readonly code: ProblemCode,
    readonly detail: string,
    readonly extra: { errors?: Record<string, string>; current?: unknown } = {},
  ) {
    super(detail);
  }
}

/** 404: it isn't there, or this actor may not know that it is. */
export function notFound(what = 'This page'): DomainProblem {
  return new DomainProblem(404, 'not_found', `${what} does not exist, or you can't see it.`);
}

/** 403: the actor sees the thing but may not do this. */
export function forbidden(detail = "You can't do this in this club."): DomainProblem {
  return new DomainProblem(403, 'forbidden', detail);
}

/** 409: somebody changed it meanwhile; `current` is what it is now. */
export function stale(detail: string, current?: unknown): DomainProblem {
  return new DomainProblem(409, 'stale', detail, { current });
}

/** 409: the state of the thing does not allow it. */
export function wrongState(detail: string, current?: unknown): DomainProblem {
  return new DomainProblem(409, 'wrong_state', detail, { current });
}

/** 422: the shape was right, the content breaks a rule; `errors` by field path ("lines.2.stepMg"). */
export function invalid(errors: Record<string, string>, detail?: string): DomainProblem {
  return new DomainProblem(
    422,
    'invalid',
    detail ?? Object.values(errors)[0] ?? 'Check the marked fields.',
    {
      errors,
    },
  );
}
