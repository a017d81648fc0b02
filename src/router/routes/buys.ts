import type { RouteRecordRaw } from 'vue-router';

export const buysRoutes: RouteRecordRaw[] = [
  {
    path: '/c/:club/buys',
    name: 'buys',
    component: () => import('src/pages/buys/BuysPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Buys', nav: 'buys' },
  },
  {
    path: '/c/:club/buys/:buy',
    name: 'buy',
    component: () => import('src/pages/buys/BuyPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Buy', nav: 'buys' },
    // One page a step, shown inside the buy's own frame; the frame sends `buy` to the step at hand.
    children: [
      {
        path: 'locked',
        name: 'buy-locked',
        component: () => import('src/pages/buys/BuyLockedPage.vue'),
        props: true,
      },
      {
        path: 'orders',
        name: 'buy-orders',
        component: () => import('src/pages/buys/BuyOrdersPage.vue'),
        props: true,
      },
      {
        path: 'settled',
        name: 'buy-settled',
        component: () => import('src/pages/buys/BuySettledPage.vue'),
        props: true,
      },
      {
        path: 'sheet',
        name: 'buy-sheet',
        component: () => import('src/pages/buys/BuySheetPage.vue'),
        props: true,
      },
      {
        path: 'arrived',
        name: 'buy-arrived',
        component: () => import('src/pages/buys/BuyArrivedPage.vue'),
        props: true,
      },
      {
        path: 'split',
        name: 'buy-split',
        component: () => import('src/pages/buys/BuySplitPage.vue'),
        props: true,
      },
      {
        path: 'pickup',
        name: 'buy-pickup',
        component: () => import('src/pages/buys/BuyPickupPage.vue'),
        props: true,
      },
      {
        path: 'precursors',
        name: 'buy-precursors',
        component: () => import('src/pages/buys/BuyPrecursorsPage.vue'),
        props: true,
      },
      {
        path: 'notices',
        name: 'buy-notices',
        component: () => import('src/pages/buys/BuyNoticesPage.vue'),
        props: true,
      },
      {
        path: 'draft',
        name: 'buy-draft',
        component: () => import('src/pages/buys/DraftPage.vue'),
        props: true,
      },
    ],
  },
  {
    path: '/c/:club/buys/:buy/orders/:supplier/sheet',
    name: 'buy-order-sheet',
    component: () => import('src/pages/buys/OrderSheetPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'print', title: 'Order sheet', nav: 'buys' },
  },
];
