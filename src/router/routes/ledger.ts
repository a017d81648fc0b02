import type { RouteRecordRaw } from 'vue-router';

const meta = { needs: 'session', layout: 'main', title: 'Ledger', nav: 'ledger' } as const;

export const ledgerRoutes: RouteRecordRaw[] = [
  {
    path: '/c/:club/ledger',
    name: 'ledger',
    component: () => import('src/pages/ledger/LedgerPage.vue'),
    props: true,
    meta,
  },
  {
    path: '/c/:club/ledger/mine',
    name: 'ledger-mine',
    component: () => import('src/pages/ledger/OwnStatementPage.vue'),
    props: true,
    meta: { ...meta, title: 'My statement' },
  },
  {
    path: '/c/:club/ledger/members',
    name: 'ledger-members',
    component: () => import('src/pages/ledger/LedgerMembersPage.vue'),
    props: true,
    meta: { ...meta, title: 'Dues', roles: ['treasurer'] },
  },
  {
    path: '/c/:club/ledger/members/:member',
    name: 'ledger-member',
    component: () => import('src/pages/ledger/MemberStatementPage.vue'),
    props: true,
    meta: { ...meta, title: 'Statement', roles: ['treasurer'] },
  },
  {
    path: '/c/:club/ledger/journal',
    name: 'ledger-journal',
    component: () => import('src/pages/ledger/JournalPage.vue'),
    props: true,
    meta: { ...meta, title: 'Journal', roles: ['treasurer'] },
  },
];
