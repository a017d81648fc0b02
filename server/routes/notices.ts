import { z } from 'zod';
import {
  DeliveryList,
  NoticeDraft,
  NoticeList,
  NoticePreferences,
  SendNoticeBody,
  SendNoticeReply,
  UnsubscribeReply,
} from '#shared/schemas/notices.ts';
import { buyRoute, clubRoute, visitorRoute, type RouteDef } from '../middlewares/route.ts';
import { canReadDeliveries, canReadOwnNotices, canSendNotices } from '../policies/notices.ts';
import { draftNotice, listDeliveries, sendBuyNotice } from '../services/notices/buyNotices.ts';
import {
  listOwnNotices,
  markNoticesRead,
  readPreferences,
  savePreferences,
} from '../services/notices/ownNotices.ts';
import { readUnsubscribe, unsubscribe } from '../services/notices/unsubscribe.ts';

const Token = z.strictObject({ token: z.string().max(300) });
// A mail program posts the form field of RFC 8058 here; a page posts nothing.
const OneClick = z.looseObject({});

export const noticesRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/notices',
    summary: 'Own notices in this club, newest first',
    allow: canReadOwnNotices,
    former: true,
    reply: NoticeList,
    run: ({ actor }) => listOwnNotices(actor),
  }),
  clubRoute({
    method: 'post',
    path: '/notices/read',
    summary: 'Mark own notices as read',
    allow: canReadOwnNotices,
    former: true,
    reply: NoticeList,
    run: ({ actor }) => markNoticesRead(actor),
  }),
  clubRoute({
    method: 'get',
    path: '/notices/preferences',
    summary: 'Kinds of notices that come in the app alone',
    allow: canReadOwnNotices,
    former: true,
    reply: NoticePreferences,
    run: ({ actor }) => readPreferences(actor),
  }),
  clubRoute({
    method: 'put',
    path: '/notices/preferences',
    summary: 'Choose which kinds come in the app alone',
    allow: canReadOwnNotices,
    former: true,
    body: NoticePreferences,
    reply: NoticePreferences,
    run: ({ actor, body }) => savePreferences(actor, body),
  }),
  visitorRoute({
    method: 'get',
    path: '/unsubscribe/:token',
    summary: 'What a link at the foot of a mail would turn off',
    params: Token,
    reply: UnsubscribeReply,
    run: ({ params }) => readUnsubscribe(params.token),
  }),
  visitorRoute({
    method: 'post',
    path: '/unsubscribe/:token',
    summary: 'Turn one kind of notice off without signing in (RFC 8058)',
    params: Token,
    body: OneClick,
    reply: UnsubscribeReply,
    run: ({ params }) => unsubscribe(params.token),
  }),
  buyRoute({
    method: 'get',
    path: '/notices',
    summary: 'How the notices of a buy fared',
    allow: canReadDeliveries,
    reply: DeliveryList,
    run: ({ actor }) => listDeliveries(actor),
  }),
  buyRoute({
    method: 'get',
    path: '/notices/draft',
    summary: 'Words to start a notice from, and whom it could go to',
    allow: canSendNotices,
    reply: NoticeDraft,
    run: ({ actor }) => draftNotice(actor),
  }),
  buyRoute({
    method: 'post',
    path: '/notices',
    summary: 'Send a notice in own words to people of the club',
    allow: canSendNotices,
    body: SendNoticeBody,
    reply: SendNoticeReply,
    run: ({ actor, body }) => sendBuyNotice(actor, body),
  }),
];
