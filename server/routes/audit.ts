import { AuditChoices, AuditPage, AuditQuery } from '#shared/schemas/audit.ts';
import { clubRoute, type RouteDef } from '../middlewares/route.ts';
import { canReadAudit } from '../policies/clubs.ts';
import { listAudit, listAuditChoices } from '../services/audit/listAudit.ts';

export const auditRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/audit',
    summary: 'Who did what, and when; newest first',
    allow: canReadAudit,
    query: AuditQuery,
    reply: AuditPage,
    run: ({ actor, query }) => listAudit(actor, query),
  }),
  clubRoute({
    method: 'get',
    path: '/audit/choices',
    summary: 'What the audit log can be narrowed to',
    allow: canReadAudit,
    reply: AuditChoices,
    run: ({ actor }) => listAuditChoices(actor),
  }),
];
