import { z } from 'zod';
import { OutboxList } from '#shared/schemas/outbox.ts';
import { env } from '../config/runtime.ts';
import { FileReply, visitorRoute, type RouteDef } from '../middlewares/route.ts';
import { listDemoMail, readDemoMail } from '../services/outbox/readDemoMail.ts';

const MailId = z.strictObject({ mail: z.string().regex(/^\d{15}-[0-9a-f-]{36}$/) });

/** Mail of the demo clubs; these routes exist in demo mode only. */
export const outboxRoutes: RouteDef[] = env.demo
  ? [
      visitorRoute({
        method: 'get',
        path: '/outbox',
        summary: 'Mail of the demo clubs (demo mode only)',
        reply: OutboxList,
        run: () => listDemoMail(),
      }),
      visitorRoute({
        method: 'get',
        path: '/outbox/:mail/html',
        summary: 'One mail as its reader sees it (demo mode only)',
        params: MailId,
        reply: 'file',
        run: async ({ params }) =>
          new FileReply('text/html; charset=utf-8', (await readDemoMail(params.mail)).html, {
            headers: {
              'Content-Security-Policy':
                "default-src 'none'; style-src 'unsafe-inline'; frame-ancestors 'self'; sandbox allow-popups allow-top-navigation-by-user-activation",
              'X-Frame-Options': 'SAMEORIGIN',
            },
          }),
      }),
    ]
  : [];
