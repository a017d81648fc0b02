import type { RouteRecordRaw } from 'vue-router';

export const saltsRoutes: RouteRecordRaw[] = [
  {
    path: '/c/:club/salts',
    name: 'salts',
    component: () => import('src/pages/salts/SaltsPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Salts', nav: 'salts' },
  },
  {
    path: '/c/:club/salts/:salt',
    name: 'salt',
    component: () => import('src/pages/salts/SaltPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Salt', nav: 'salts' },
  },
  {
    path: '/c/:club/suppliers',
    name: 'suppliers',
    component: () => import('src/pages/suppliers/SuppliersPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Suppliers', nav: 'suppliers' },
  },
  {
    path: '/c/:club/suppliers/:supplier',
    name: 'supplier',
    component: () => import('src/pages/suppliers/SupplierPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Supplier', nav: 'suppliers' },
  },
  {
    path: '/c/:club/suppliers/:supplier/import',
    name: 'offers-import',
    component: () => import('src/pages/suppliers/ImportOffersPage.vue'),
    props: true,
    meta: { needs: 'session', layout: 'main', title: 'Import offers', nav: 'suppliers' },
  },
];
