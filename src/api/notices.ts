import type {
  DeliveryList,
  NoticeDraft,
  NoticeList,
  NoticePreferences,
  SendNoticeBody,
  SendNoticeReply,
  UnsubscribeReply,
} from '#shared/schemas/notices.ts';
import type { OutboxList } from '#shared/schemas/outbox.ts';
import { api, apiUrl } from 'src/api/http.ts';

const notices = (club: string) => `/clubs/${club}/notices`;
const ofBuy = (club: string, buy: string) => `/clubs/${club}/buys/${buy}/notices`;

export const getNotices = (club: string) => api.get<NoticeList>(notices(club));
export const postNoticesRead = (club: string) => api.post<NoticeList>(`${notices(club)}/read`);
export const getPreferences = (club: string) =>
  api.get<NoticePreferences>(`${notices(club)}/preferences`);
export const putPreferences = (club: string, body: NoticePreferences) =>
  api.put<NoticePreferences>(`${notices(club)}/preferences`, body);

export const getUnsubscribe = (token: string) => api.get<UnsubscribeReply>(`/unsubscribe/${token}`);
export const postUnsubscribe = (token: string) =>
  api.post<UnsubscribeReply>(`/unsubscribe/${token}`);

export const getDeliveries = (club: string, buy: string) => api.get<DeliveryList>(ofBuy(club, buy));
export const getNoticeDraft = (club: string, buy: string) =>
  api.get<NoticeDraft>(`${ofBuy(club, buy)}/draft`);
export const postNotice = (club: string, buy: string, body: SendNoticeBody) =>
  api.post<SendNoticeReply>(ofBuy(club, buy), body);

export const getOutbox = () => api.get<OutboxList>('/outbox');
/** Address of a received mail as its reader sees it, for a frame. */
export const mailHtmlUrl = (id: string) => apiUrl(`/outbox/${id}/html`);
