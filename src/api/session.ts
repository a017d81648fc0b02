import type { SessionReply } from '#shared/schemas/session.ts';
import { api } from 'src/api/http.ts';

export const getSession = () => api.get<SessionReply>('/session');

export const postSession = (body: { email: string; password: string }) =>
  api.post<undefined>('/session', body);

export const postDemoSession = (body: { email: string }) =>
  api.post<undefined>('/session/demo', body);

export const deleteSession = () => api.del<undefined>('/session');
