import type { RouteRecordRaw } from 'vue-router';

export const accountsRoutes: RouteRecordRaw[] = [
  {
    path: '/sign-in',
    name: 'sign-in',
    component: () => import('src/pages/accounts/SignInPage.vue'),
    meta: { needs: 'guest', layout: 'guest', title: 'Sign in' },
  },
  {
    path: '/sign-up',
    name: 'sign-up',
    component: () => import('src/pages/accounts/SignUpPage.vue'),
    meta: { needs: 'guest', layout: 'guest', title: 'Sign up' },
  },
  {
    path: '/reset',
    name: 'reset-request',
    component: () => import('src/pages/accounts/RequestResetPage.vue'),
    meta: { needs: 'none', layout: 'guest', title: 'Reset your password' },
  },
  {
    path: '/reset/:token',
    name: 'reset',
    component: () => import('src/pages/accounts/ResetPage.vue'),
    props: true,
    meta: { needs: 'none', layout: 'guest', title: 'Set a new password' },
  },
  {
    path: '/confirm-email/:token',
    name: 'confirm-email',
    component: () => import('src/pages/accounts/ConfirmEmailPage.vue'),
    props: true,
    meta: { needs: 'none', layout: 'guest', title: 'Confirm your address' },
  },
  {
    path: '/account',
    name: 'account',
    component: () => import('src/pages/accounts/AccountPage.vue'),
    meta: { needs: 'session', layout: 'main', title: 'Your account' },
  },
];
