import type { RouteRecordRaw } from 'vue-router';

export const accountsRoutes: RouteRecordRaw[] = [];
