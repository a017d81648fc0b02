import type {
  AccountReply,
  ChangeEmailBody,
  ChangePasswordBody,
  SignUpBody,
  TokenReply,
} from '#shared/schemas/accounts.ts';
import type { DemoPeople, SessionReply } from '#shared/schemas/session.ts';
import { api } from 'src/api/http.ts';

const one = encodeURIComponent;

export const postAccount = (body: SignUpBody) => api.post<SessionReply>('/accounts', body);

export const getDemoPeople = () => api.get<DemoPeople>('/session/demo');

export const postReset = (email: string) => api.post<undefined>('/resets', { email });

export const getReset = (token: string) => api.get<TokenReply>(`/resets/${one(token)}`);

export const postNewPassword = (token: string, password: string) =>
  api.post<SessionReply>(`/resets/${one(token)}`, { password });

export const getEmailConfirmation = (token: string) =>
  api.get<TokenReply>(`/email-confirmations/${one(token)}`);

export const postEmailConfirmation = (token: string) =>
  api.post<TokenReply>(`/email-confirmations/${one(token)}`);

export const getAccount = () => api.get<AccountReply>('/account');

export const patchAccount = (displayName: string) =>
  api.patch<undefined>('/account', { displayName });

export const putPassword = (body: ChangePasswordBody) =>
  api.put<undefined>('/account/password', body);

export const postEmail = (body: ChangeEmailBody) => api.post<undefined>('/account/email', body);

export const deleteSessions = () => api.del<undefined>('/account/sessions');

export const deleteAccount = (password: string) => api.del<undefined>('/account', { password });
