import type { RouteRecordRaw } from 'vue-router';

export const shelfRoutes: RouteRecordRaw[] = [
  {
    path: '/c/:club/shelf',
    name: 'shelf',
    component: () => import('src/pages/shelf/ShelfPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Shelf', nav: 'shelf' },
  },
  {
    path: '/c/:club/precursors',
    name: 'precursors',
    component: () => import('src/pages/precursors/PrecursorsPage.vue'),
    props: true,
    meta: {
      needs: 'session',
      layout: 'main',
      title: 'Records of reportable salts',
      nav: 'precursors',
      roles: ['steward'],
    },
  },
];
