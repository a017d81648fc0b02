import type { RouteRecordRaw } from 'vue-router';

export const noticesRoutes: RouteRecordRaw[] = [
  {
    path: '/c/:club/notices',
    name: 'notices',
    component: () => import('src/pages/notices/NoticesPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Notices', nav: 'notices' },
  },
  {
    path: '/unsubscribe/:token',
    name: 'unsubscribe',
    component: () => import('src/pages/notices/UnsubscribePage.vue'),
    props: true,
    meta: { needs: 'none', layout: 'guest', title: 'Turn off notices' },
  },
  {
    path: '/outbox',
    name: 'outbox',
    component: () => import('src/pages/notices/OutboxPage.vue'),
    meta: { needs: 'none', layout: 'guest', title: 'Outbox of the demo' },
  },
];
