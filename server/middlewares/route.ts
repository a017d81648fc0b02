import type { Readable } from 'node:stream';
import type { Request, RequestHandler, Response } from 'express';
import type { z } from 'zod';
import type { AccountActor, Alongside, BuyActor, ClubActor } from '../services/actors.ts';

/** A reply that is not plain JSON: a file, a CSV, bytes kept by version. */
export class FileReply {
  constructor(
    readonly contentType: string,
    readonly body: Buffer | string | Readable,
    readonly options: {
      fileName?: string;
      disposition?: 'inline' | 'attachment';
      etag?: string;
      headers?: Record<string, string>;
    } = {},
  ) {}
}

/** A file that came with the request, in memory, at most 10 MB; its type is not yet believed. */
export interface UploadedFile {
  readonly fileName: string;
  readonly bytes: Buffer;
}

export interface Call<A, P, Q, B> {
  readonly actor: A;
  readonly params: P;
  readonly query: Q;
  readonly body: B;
  readonly file: UploadedFile | undefined;
  readonly req: Request;
  readonly res: Response;
}

export type Level = 'visitor' | 'account' | 'club' | 'buy';

/** What a route of any level says of itself, its types worn off: for Express, for OpenAPI and for the refusal tests. */
export interface RouteDef {
  readonly level: Level;
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** Path below /api/v1, with `:name` parameters, complete. */
  readonly path: string;
  readonly summary: string;
  readonly former: boolean;
  readonly params: z.ZodType | undefined;
  readonly query: z.ZodType | undefined;
  readonly body: z.ZodType | undefined;
  readonly takesFile: boolean;
  readonly reply: z.ZodType | 'file';
  readonly status: number;
  readonly before: readonly RequestHandler[];
  /** Something to be read in the actor's own statement, from the path's parameters as they came; null: nothing. */
  readonly alongside: ((params: Record<string, unknown>) => Alongside | null) | undefined;
  readonly allow: (actor: never) => boolean;
  readonly run: (call: never) => Promise<unknown>;
}

interface Spec<A, P, Q, B, R> {
  method: RouteDef['method'];
  path: string;
  summary: string;
  params?: z.ZodType<P>;
  query?: z.ZodType<Q>;
  body?: z.ZodType<B>;
  /** Takes one file in the multipart field `file`; other fields are validated as `body`. */
  takesFile?: boolean;
  /** Shape of the JSON reply, or 'file' when `run` returns a FileReply. */
  reply: z.ZodType<R> | 'file';
  status?: number;
  /** Limits and the like, run before the actor is looked up. */
  before?: RequestHandler[];
  alongside?: NonNullable<RouteDef['alongside']>;
  run: (call: Call<A, P, Q, B>) => Promise<R | FileReply>;
}

function define<A, P, Q, B, R>(
  level: Level,
  prefix: string,
  spec: Spec<A, P, Q, B, R> & { allow: (actor: A) => boolean; former?: boolean },
): RouteDef {
  return {
    level,
    method: spec.method,
    path: `${prefix}${spec.path}`,
    summary: spec.summary,
    former: spec.former ?? false,
    params: spec.params,
    query: spec.query,
    body: spec.body,
    takesFile: spec.takesFile ?? false,
    reply: spec.reply,
    status: spec.status ?? 200,
    before: spec.before ?? [],
    alongside: spec.alongside,
    allow: spec.allow,
    run: spec.run,
  };
}

/** A route anyone may call; `actor` is null for a visitor. */
export function visitorRoute<P, Q, B, R>(spec: Spec<AccountActor | null, P, Q, B, R>): RouteDef {
  return define('visitor', '', { ...spec, allow: () => true });
}

/** A route for anyone signed in. */
export function accountRoute<P, Q, B, R>(spec: Spec<AccountActor, P, Q, B, R>): RouteDef {
  return define('account', '', { ...spec, allow: () => true });
}

/** A route below /clubs/:club. Strangers get 404, members for whom `allow` is false 403. */
export function clubRoute<P, Q, B, R>(
  spec: Spec<ClubActor, P, Q, B, R> & { allow: (actor: ClubActor) => boolean; former?: boolean },
): RouteDef {
  return define('club', '/clubs/:club', spec);
}

/** A route below /clubs/:club/buys/:buy. A buy of another club, or another's draft, is 404. `former`: also for those who left. */
export function buyRoute<P, Q, B, R>(
  spec: Spec<BuyActor, P, Q, B, R> & { allow: (actor: BuyActor) => boolean; former?: boolean },
): RouteDef {
  return define('buy', '/clubs/:club/buys/:buy', spec);
}
