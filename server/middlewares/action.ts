import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Request, RequestHandler, Response } from 'express';
import { z } from 'zod';
import { requestSeconds } from '../config/metrics.ts';
import { env } from '../config/runtime.ts';
import { DomainProblem, forbidden, notFound } from '../services/problem.ts';
import {
  findAccountActor,
  findBuyActor,
  findBuyActorAt,
  findClubActor,
  type AccountActor,
} from '../services/actors.ts';
import { FileReply, type RouteDef } from './route.ts';

const uuid = z.uuid();

function fieldErrors(error: z.ZodError): Record<string, string> {
  const errors: Record<string, string> = {};
  for (const issue of error.issues) {
    const path = issue.path.map(String).join('.') || 'form';
    errors[path] ??= issue.message;
  }
  return errors;
}

function shaped(schema: z.ZodType | undefined, value: unknown): unknown {
  if (!schema) return undefined;
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  throw new DomainProblem(422, 'invalid', 'Check the marked fields.', {
    errors: fieldErrors(parsed.error),
  });
}

async function findActor(route: RouteDef, req: Request) {
  const requestId = String(req.id);
  const accountId = req.user?.id;
  if (route.level === 'buy' && accountId !== undefined && uuid.safeParse(req.params.buy).success) {
    const { club, buy } = req.params;
    const alongside = route.alongside?.(req.params);
    const found = await findBuyActorAt(accountId, String(club), String(buy), requestId, alongside);
    if (found && (found.status === 'active' || route.former)) return found;
    // Whoever isn't found is told by the steps below what is missing.
  }
  const account: AccountActor | null =
    accountId === undefined ? null : await findAccountActor(accountId, requestId);
  if (route.level === 'visitor') return account;
  if (!account) throw new DomainProblem(401, 'signed_out', 'Sign in first.');
  if (route.level === 'account') return account;
  const club = await findClubActor(account.accountId, String(req.params.club), requestId);
  if (!club || (club.status !== 'active' && !route.former)) throw notFound('This club');
  if (route.level === 'club') return club;
  const buyId = String(req.params.buy);
  const buy = uuid.safeParse(buyId).success ? await findBuyActor(club, buyId) : null;
  if (!buy) throw notFound('This buy');
  return buy;
}

async function sendFile(res: Response, req: Request, reply: FileReply): Promise<void> {
  const { fileName, disposition, etag, headers } = reply.options;
  res.type(reply.contentType);
  for (const [name, value] of Object.entries(headers ?? {})) res.setHeader(name, value);
  if (fileName) {
    const ascii = fileName.replace(/[^\x20-\x7e]|["\\]/g, '_');
    res.setHeader(
      'Content-Disposition',
      `${disposition ?? 'attachment'}; filename="${ascii}"; filename*=UTF-8''${encodeURIComponent(fileName)}`,
    );
  }
  if (etag) {
    res.setHeader('ETag', etag);
    res.setHeader('Cache-Control', 'private, no-cache');
    if (req.headers['if-none-match'] === etag) {
      res.status(304).end();
      return;
    }
  }
  if (reply.body instanceof Readable) await pipeline(reply.body, res);
  else res.end(reply.body);
}

/**
 * The one way from a route's definition to a reply: who is it, may they, is the shape right, run, present.
 * A route's policy is asked before its body is looked at, so that a refusal tells nothing of the rules inside.
 */
export function action(route: RouteDef): RequestHandler {
  return async (req, res) => {
    const took = requestSeconds.startTimer({ method: route.method, route: route.path });
    res.once('finish', () => took({ status: String(res.statusCode) }));
    const actor = await findActor(route, req);
    if (!route.allow(actor as never)) throw forbidden();
    const call = {
      actor,
      params: shaped(route.params, req.params),
      query: shaped(route.query, req.query),
      body: shaped(route.body, req.body ?? {}),
      file: req.file ? { fileName: req.file.originalname, bytes: req.file.buffer } : undefined,
      req,
      res,
    };
    const result = await route.run(call as never);
    if (result instanceof FileReply) {
      await sendFile(res, req, result);
      return;
    }
    if (res.headersSent) return;
    // Replies are checked against their schema wherever a mismatch can still be mended.
    if (env.nodeEnv !== 'production' && route.reply !== 'file') route.reply.parse(result);
    res.status(route.status).json(result);
  };
}
