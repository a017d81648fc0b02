import type { AuditChoices, AuditPage } from '#shared/schemas/audit.ts';
import { api } from 'src/api/http.ts';

export type AuditFilter = { action?: string; person?: string; buy?: string };

export const getAudit = (club: string, filter: AuditFilter, before: number | null) =>
  api.get<AuditPage>(`/clubs/${club}/audit`, { ...filter, before });

export const getAuditChoices = (club: string) =>
  api.get<AuditChoices>(`/clubs/${club}/audit/choices`);
