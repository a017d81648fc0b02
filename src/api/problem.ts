/** A refused or failed request, read from the server's problem document (RFC 9457). */
export class ApiProblem extends Error {
  override name = 'ApiProblem';
  readonly status: number;
  readonly code: string;
  readonly title: string;
  readonly detail: string;
  /** What is wrong with each field, by its path in the body, such as `lines.0.stepMg`. */
  readonly errors: Record<string, string>;
  /** For a stale write: the record as it is now. */
  readonly current: unknown;

  constructor(document: {
    status: number;
    code: string;
    title: string;
    detail?: string;
    errors?: Record<string, string>;
    current?: unknown;
  }) {
    super(document.detail ?? document.title);
    this.status = document.status;
    this.code = document.code;
    this.title = document.title;
    this.detail = document.detail ?? document.title;
    this.errors = document.errors ?? {};
    this.current = document.current;
  }
}

export const isProblem = (error: unknown, code?: string): error is ApiProblem =>
  error instanceof ApiProblem && (code === undefined || error.code === code);

/** Nothing came back: no network, or the server is away. */
export const makeOfflineProblem = () =>
  new ApiProblem({
    status: 0,
    code: 'offline',
    title: 'No connection',
    detail: 'Tarewell could not be reached. Check your connection and try again.',
  });

const isRecord = (value: unknown): value is Record<string, unknown> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

const readText = (value: unknown) => (typeof value === 'string' && value ? value : undefined);

const readErrors = (value: unknown) => {
  const errors: Record<string, string> = {};
  if (!isRecord(value)) return errors;
  for (const [field, message] of Object.entries(value)) {
    const first: unknown = Array.isArray(message) ? message[0] : message;
    if (typeof first === 'string') errors[field] = first;
  }
  return errors;
};

/** Reads a refused reply; a body that is no problem document gives a plain one for its status. */
export async function readProblem(reply: Response): Promise<ApiProblem> {
  const body: unknown = await reply.json().catch(() => null);
  const { code, title, detail, errors, current } = isRecord(body) ? body : {};
  return new ApiProblem({
    status: reply.status,
    code: readText(code) ?? `http_${reply.status}`,
    title: readText(title) ?? 'Something went wrong',
    detail:
      readText(detail) ??
      (reply.status >= 500
        ? 'The server could not do that. Nothing was changed. Try again.'
        : 'That was refused. Nothing was changed.'),
    errors: readErrors(errors),
    current,
  });
}

/** What was thrown, as a problem; a fault in the page itself keeps its message. */
export const asProblem = (error: unknown): ApiProblem =>
  error instanceof ApiProblem
    ? error
    : new ApiProblem({
        status: 0,
        code: 'page_fault',
        title: 'Something went wrong',
        detail: error instanceof Error ? error.message : String(error),
      });
