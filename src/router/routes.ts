import type { RouteRecordRaw } from 'vue-router';
import { accountsRoutes } from 'src/router/routes/accounts.ts';
import { buysRoutes } from 'src/router/routes/buys.ts';
import { clubsRoutes } from 'src/router/routes/clubs.ts';
import { ledgerRoutes } from 'src/router/routes/ledger.ts';
import { noticesRoutes } from 'src/router/routes/notices.ts';
import { saltsRoutes } from 'src/router/routes/salts.ts';
import { shelfRoutes } from 'src/router/routes/shelf.ts';

const layouts = {
  main: () => import('src/layouts/MainLayout.vue'),
  guest: () => import('src/layouts/GuestLayout.vue'),
  print: () => import('src/layouts/PrintLayout.vue'),
};

const own: RouteRecordRaw[] = [
  {
    path: '/',
    name: 'home',
    component: () => import('src/pages/HomePage.vue'),
    meta: { needs: 'none', layout: 'guest', title: '' },
  },
  {
    path: '/:path(.*)*',
    name: 'not-found',
    component: () => import('src/pages/NotFoundPage.vue'),
    meta: { needs: 'none', layout: 'guest', title: 'Not found' },
  },
];

const all: RouteRecordRaw[] = [
  ...own,
  ...accountsRoutes,
  ...clubsRoutes,
  ...saltsRoutes,
  ...shelfRoutes,
  ...buysRoutes,
  ...ledgerRoutes,
  ...noticesRoutes,
];

const inLayout = (layout: keyof typeof layouts): RouteRecordRaw => ({
  path: '/',
  component: layouts[layout],
  children: all.filter((route) => route.meta?.layout === layout),
});

/** Every page, under the layout that its `meta` names. */
export const routes: RouteRecordRaw[] = [inLayout('main'), inLayout('guest'), inLayout('print')];
