import type { RouteRecordRaw } from 'vue-router';

export const clubsRoutes: RouteRecordRaw[] = [
  {
    path: '/welcome',
    name: 'welcome',
    component: () => import('src/pages/clubs/WelcomePage.vue'),
    meta: { needs: 'guest', layout: 'guest', title: 'Welcome' },
  },
  {
    path: '/clubs/new',
    name: 'clubs-new',
    component: () => import('src/pages/clubs/FoundClubPage.vue'),
    meta: { needs: 'session', layout: 'main', title: 'Found a club' },
  },
  {
    path: '/join/:token',
    name: 'join',
    component: () => import('src/pages/clubs/JoinPage.vue'),
    props: true,
    meta: { needs: 'none', layout: 'guest', title: 'Join a club' },
  },
  {
    path: '/public/:slug',
    name: 'public-club',
    component: () => import('src/pages/clubs/PublicClubPage.vue'),
    props: true,
    meta: { needs: 'none', layout: 'guest', title: 'Club' },
  },
  {
    path: '/c/:club/start',
    name: 'club-start',
    component: () => import('src/pages/clubs/StartPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'First steps', nav: 'buys' },
  },
  {
    path: '/c/:club/members',
    name: 'members',
    component: () => import('src/pages/clubs/MembersPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Members', nav: 'members' },
  },
  {
    path: '/c/:club/settings',
    name: 'settings',
    component: () => import('src/pages/clubs/SettingsPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Settings', nav: 'settings' },
  },
  {
    path: '/c/:club/audit',
    name: 'audit',
    component: () => import('src/pages/clubs/AuditPage.vue'),
    props: true,
    meta: {
      needs: 'session',
      layout: 'main',
      title: 'Audit log',
      nav: 'audit',
      roles: ['steward'],
    },
  },
];
